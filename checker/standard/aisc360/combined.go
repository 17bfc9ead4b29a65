package aisc360

func (c *calc) interaction() {}
