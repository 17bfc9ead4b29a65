package lsp

import "time"

// Clock is where the server takes its time from: tests hand in one that they
// move themselves.
type Clock interface {
	// Now is the present.
	Now() time.Time
	// AfterFunc calls f on a goroutine of its own after a while, unless the
	// function that it returns is called before.
	AfterFunc(after time.Duration, f func()) (stop func())
}

// systemClock is the clock of the machine.
type systemClock struct{}

func (systemClock) Now() time.Time { return time.Now() }

func (systemClock) AfterFunc(after time.Duration, f func()) func() {
	t := time.AfterFunc(after, f)
	return func() { t.Stop() }
}
