//go:build !unix

package complete

import (
	"testing"
	"time"
)

// spent is the time since the tests began.
func spent(testing.TB) time.Duration { return time.Since(began) }

var began = time.Now()
