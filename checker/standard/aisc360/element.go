package aisc360

// element is a plate of a cross-section that can buckle in compression.
type element struct{}

// local is B4.1a.
func (c *calc) local() {}
