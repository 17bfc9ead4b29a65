package lsp

import (
	"slices"
	"sync"
	"time"
)

// testClock stands still until a test moves it.
type testClock struct {
	mu   sync.Mutex
	now  time.Time
	next []*alarm
}

type alarm struct {
	at time.Time
	f  func()
}

func newTestClock() *testClock {
	return &testClock{now: time.Date(2026, 1, 2, 3, 4, 5, 0, time.UTC)}
}

func (c *testClock) Now() time.Time {
	c.mu.Lock()
	defer c.mu.Unlock()
	return c.now
}

func (c *testClock) AfterFunc(after time.Duration, f func()) func() {
	c.mu.Lock()
	defer c.mu.Unlock()
	a := &alarm{c.now.Add(after), f}
	c.next = append(c.next, a)
	return func() {
		c.mu.Lock()
		defer c.mu.Unlock()
		c.next = slices.DeleteFunc(c.next, func(b *alarm) bool { return a == b })
	}
}

// advance moves the clock and runs what is due, earliest first.
func (c *testClock) advance(d time.Duration) {
	c.mu.Lock()
	c.now = c.now.Add(d)
	var due []*alarm
	c.next = slices.DeleteFunc(c.next, func(a *alarm) bool {
		if a.at.After(c.now) {
			return false
		}
		due = append(due, a)
		return true
	})
	c.mu.Unlock()
	slices.SortStableFunc(due, func(a, b *alarm) int { return a.at.Compare(b.at) })
	for _, a := range due {
		a.f()
	}
}
