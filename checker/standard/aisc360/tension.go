package aisc360

// tension is chapter D.
func (c *calc) tension() {}

// slenderness is the limit that the member sets itself.
func (c *calc) slenderness() {}
