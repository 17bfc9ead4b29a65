package lsp

import (
	"strconv"
	"sync"

	"go.lsp.dev/uri"
)

// tokenMemory keeps the tokens that each open document was last answered with,
// so that the next answer can be what changed.
type tokenMemory struct {
	mu    sync.Mutex
	count int
	last  map[uri.URI]rememberedTokens
}

type rememberedTokens struct {
	id   string
	data []uint32
}

// keep remembers the tokens of a file and gives them a name. What is remembered
// of documents that have been closed is forgotten.
func (m *tokenMemory) keep(s *Server, f *File, data []uint32) string {
	u := f.URI(f.Name)
	m.mu.Lock()
	defer m.mu.Unlock()
	s.mu.Lock()
	for old := range m.last {
		if s.docs[old] == nil {
			delete(m.last, old)
		}
	}
	open := s.docs[u] != nil
	s.mu.Unlock()
	m.count++
	id := strconv.Itoa(m.count)
	if open {
		if m.last == nil {
			m.last = map[uri.URI]rememberedTokens{}
		}
		m.last[u] = rememberedTokens{id, data}
	}
	return id
}

// recall gives the tokens of a file by the name of the answer.
func (m *tokenMemory) recall(u uri.URI, id string) ([]uint32, bool) {
	m.mu.Lock()
	defer m.mu.Unlock()
	r := m.last[u]
	return r.data, r.id == id && id != ""
}
