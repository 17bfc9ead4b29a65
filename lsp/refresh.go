package lsp

import (
	"sync"
	"time"
)

// refresher has the client ask again for hints, lenses and the like when
// results changed without an edit of their document. It asks once for a burst
// of changes.
type refresher struct {
	server *Server
	mu     sync.Mutex
	due    bool
}

const refreshAfter = 250 * time.Millisecond

// soon asks in a moment.
func (r *refresher) soon() {
	r.mu.Lock()
	defer r.mu.Unlock()
	if r.due {
		return
	}
	var methods []string
	for _, f := range features {
		if f.refresh != nil {
			if m := f.refresh(r.server.client); m != "" {
				methods = append(methods, m)
			}
		}
	}
	if len(methods) == 0 {
		return
	}
	r.due = true
	r.server.clock.AfterFunc(refreshAfter, func() {
		r.mu.Lock()
		r.due = false
		r.mu.Unlock()
		if r.server.ctx.Err() != nil {
			return
		}
		r.server.background(func() {
			for _, m := range methods {
				if err := r.server.call(m, nil, nil); err != nil && r.server.ctx.Err() == nil {
					r.server.log.warn("the client refuses %s: %v", m, err)
				}
			}
		})
	})
}
