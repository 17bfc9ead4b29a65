package aisc360

func (c *calc) shears() {}
