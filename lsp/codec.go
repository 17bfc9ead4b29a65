package lsp

import (
	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
)

// codec writes and reads what is inside messages. It hands on to the protocol
// library, which alone knows its union types, and passes on what is written
// already.
type codec struct{}

// Marshal writes a value; a raw message is taken as it is.
func (codec) Marshal(v any) ([]byte, error) {
	if raw, ok := v.(jsonrpc2.RawMessage); ok {
		if raw == nil {
			return []byte("null"), nil
		}
		return raw, nil
	}
	return protocol.Marshal(v)
}

// Unmarshal reads a value; a raw message is copied.
func (codec) Unmarshal(data []byte, v any) error {
	if raw, ok := v.(*jsonrpc2.RawMessage); ok {
		*raw = append(jsonrpc2.RawMessage(nil), data...)
		return nil
	}
	return protocol.Unmarshal(data, v)
}
