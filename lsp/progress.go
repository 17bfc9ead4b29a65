package lsp

import (
	"fmt"
	"sync"
	"time"

	"go.lsp.dev/protocol"
)

// progress shows the client that something takes long. It shows nothing of what
// is done within a second.
type progress struct {
	server *Server
	title  string
	start  time.Time

	mu       sync.Mutex
	token    protocol.ProgressToken // nil until it shows
	ended    bool
	accepted bool // the client has created the token and been told that work began
	last     time.Time
}

func (s *Server) newProgress(title string) *progress {
	return &progress{server: s, title: title, start: s.clock.Now()}
}

const (
	progressAfter = time.Second
	progressEvery = 250 * time.Millisecond
)

// tell is called from several goroutines, once for each of all that is to do.
func (p *progress) tell(done, all int) {
	if !p.server.client.Progress || done%32 != 0 {
		return
	}
	now := p.server.clock.Now()
	if now.Sub(p.start) < progressAfter {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.ended || now.Sub(p.last) < progressEvery {
		return
	}
	p.last = now
	percent := uint32(100 * done / all)
	message := fmt.Sprintf("%d of %d", done, all)
	if p.token == nil {
		p.begin(percent, message)
		return
	}
	p.send(&protocol.WorkDoneProgressReport{Kind: "report", Message: &message, Percentage: &percent})
}

// begin creates the token and shows it. The client may refuse; it then drops
// what is sent, and need not be waited for.
func (p *progress) begin(percent uint32, message string) {
	token := protocol.String("kern-" + fmt.Sprint(p.server.tokens.Add(1)))
	p.token = token
	p.server.background(func() {
		if err := p.server.call(protocol.MethodWindowWorkDoneProgressCreate, &protocol.WorkDoneProgressCreateParams{Token: token}, nil); err != nil {
			return
		}
		p.mu.Lock()
		defer p.mu.Unlock()
		if p.ended {
			return
		}
		p.accepted = true
		p.send(&protocol.WorkDoneProgressBegin{Kind: "begin", Title: p.title, Message: &message, Percentage: &percent})
	})
}

func (p *progress) send(value any) {
	if !p.accepted {
		return
	}
	p.server.notify(protocol.MethodProgress, &protocol.ProgressParams{Token: p.token, Value: object(value)})
}

func (p *progress) end() {
	p.mu.Lock()
	defer p.mu.Unlock()
	p.ended = true
	if p.token != nil {
		p.send(&protocol.WorkDoneProgressEnd{Kind: "end"})
	}
}
