package lsp

import (
	"context"
	"sync"
)

// busy counts what the server has in hand, so that a test can wait for it to
// come to rest without guessing at times.
type busy struct {
	mu   sync.Mutex
	n    int
	rest chan struct{} // closed when n is 0; nil when nobody waits
}

func (b *busy) begin() {
	b.mu.Lock()
	b.n++
	b.mu.Unlock()
}

func (b *busy) end() {
	b.mu.Lock()
	defer b.mu.Unlock()
	b.n--
	if b.n == 0 && b.rest != nil {
		close(b.rest)
		b.rest = nil
	}
}

// wait returns when nothing is in hand, or with the context's error.
func (b *busy) wait(ctx context.Context) error {
	b.mu.Lock()
	if b.n == 0 {
		b.mu.Unlock()
		return nil
	}
	if b.rest == nil {
		b.rest = make(chan struct{})
	}
	rest := b.rest
	b.mu.Unlock()
	select {
	case <-rest:
		return nil
	case <-ctx.Done():
		return ctx.Err()
	}
}
