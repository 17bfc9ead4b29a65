package derivation

// Leading gives the steps that lead to the value of a symbol, the step that sets
// it last, in order, all of one lift. It is nil for a symbol that no step sets.
func (r *Record) Leading(symbol ID) []Step {
	need := map[ID]bool{symbol: true}
	keep := make([]bool, len(r.Steps))
	n, lift := 0, ""
	for i := len(r.Steps) - 1; i >= 0 && len(need) > 0; i-- {
		s := r.Steps[i]
		if s.Note != "" || !need[s.Symbol] || n > 0 && s.Lift != lift {
			continue
		}
		lift = s.Lift
		// a formula read what was last set before it
		delete(need, s.Symbol)
		keep[i] = true
		n++
		for _, in := range s.Inputs {
			need[in.Symbol] = true
		}
	}
	if n == 0 {
		return nil
	}
	out := make([]Step, 0, n)
	for i, s := range r.Steps {
		if keep[i] {
			out = append(out, s)
		}
	}
	return out
}
