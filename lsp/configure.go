package lsp

import (
	"context"
	"encoding/json"

	"go.lsp.dev/protocol"
)

var settingsFeature = feature{
	name:    "settings",
	methods: []string{protocol.MethodWorkspaceDidChangeConfiguration},
	register: func(client *Client) []protocol.Registration {
		if !client.ConfigurationWay {
			return nil
		}
		return []protocol.Registration{registration("settings", protocol.MethodWorkspaceDidChangeConfiguration,
			&protocol.DidChangeConfigurationRegistrationOptions{Section: protocol.String("kern")})}
	},
}

// DidChangeConfiguration takes settings that the client sends, or asks for them
// when it is a client that wants to be asked.
func (s *Server) DidChangeConfiguration(_ context.Context, p *protocol.DidChangeConfigurationParams) error {
	if s.client.Configuration {
		s.pullSettings()
		return nil
	}
	s.configure(p.Settings)
	return nil
}

// pullSettings asks the client for the settings, if it can be asked.
func (s *Server) pullSettings() {
	if !s.client.Configuration {
		return
	}
	s.background(func() {
		var answer []json.RawMessage
		err := s.call(protocol.MethodWorkspaceConfiguration, &protocol.ConfigurationParams{Items: []protocol.ConfigurationItem{{Section: pointer("kern")}}}, &answer)
		if err != nil || len(answer) != 1 {
			s.log.warn("the client gave no settings: %v", err)
			return
		}
		s.configure(answer[0])
	})
}

// configure lays settings over those of the start.
func (s *Server) configure(raw []byte) {
	s.mu.Lock()
	next := s.ground
	wrong := next.apply(raw)
	changed := next != s.settings
	s.settings = next
	if changed {
		for _, w := range s.workspaces {
			w.outer.Store(true)
			w.again()
		}
	}
	s.mu.Unlock()
	if changed {
		s.log.trace(protocol.TraceValue(next.Trace))
	}
	if wrong != nil {
		s.log.warn("settings: %v", wrong)
	}
}
