package aisc360

// lateralState is what the member is for lateral-torsional buckling.
type lateralState struct{}

func (c *calc) lateralOf() lateralState { return lateralState{} }
func (c *calc) lateralTorsional()       {}
