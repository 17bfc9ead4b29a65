package review

import (
	"math"
	"math/rand/v2"
	"slices"

	"kern/checker/standard"
)

// Cause is what one edit, or several that make no sense apart, did to a member's
// utilisation.
type Cause struct {
	Edits []Edit
	// Share is the part of the change in utilisation that the edits brought about:
	// their Shapley value. The shares of a member add up to its change. An edit
	// that can do nothing has exactly 0.
	Share float64
	// Without is the member's verdict with all edits but this.
	Without standard.Verdict
	// Turns is set when the member's verdict would be another one without the
	// edit.
	Turns bool
}

// Method says how the shares were found.
type Method uint8

// The methods.
const (
	None    Method = iota // there are no shares; Change.Why says why
	Exact                 // over all selections of the edits
	Sampled               // over selected orders of the edits
)

// String is the method's word in every output.
func (m Method) String() string { return [...]string{"none", "exact", "sampled"}[m] }

const (
	// maxExact is the number of edits up to which all selections are worked out.
	maxExact = 8
	// maxOrders is the number of orders that are sampled at most, each forwards and
	// backwards.
	maxOrders = 32
	// maxStates is the number of states that a review works out to find shares,
	// leastStates the number that every member may have.
	maxStates, leastStates = 60_000, 32
	// near is how near two utilisations are that are taken for the same: the sums
	// of loads may be formed in another order.
	near = 1e-9
)

// attribution is what the edits did to one member.
type attribution struct {
	causes []Cause
	idle   []Edit
	method Method
	why    string
	orders int // that were sampled
}

// attribute shares the change of a member's utilisation out among the edits.
// before and after are the utilisations that the two states have as a whole.
// states is about the number of states that may be worked out for it.
func attribute(earlier, later *side, member pairOf, before, after float64, states int) attribution {
	var a attribution
	if math.IsNaN(before) || math.IsNaN(after) {
		state := "before"
		if !math.IsNaN(before) {
			state = "now"
		}
		a = mix(earlier, later, member, false).listed()
		a.why = "the utilisation is not known " + state
		return a
	}
	for _, coupled := range []bool{false, true} {
		m := mix(earlier, later, member, coupled)
		a = m.listed()
		none, all := make([]bool, len(m.players)), make([]bool, len(m.players))
		for i := range all {
			all[i] = true
		}
		// the pieces must come to what the whole came to
		if !alike(m.check(none).utilisation, before) || !alike(m.check(all).utilisation, after) {
			a.why = "the change cannot be taken apart"
			continue
		}
		if m.share(&a, states) {
			return a
		}
	}
	return a
}

func alike(x, y float64) bool { return math.Abs(x-y) <= near*max(1, math.Abs(y)) }

// listed are the edits without shares.
func (m *mixture) listed() attribution {
	a := attribution{idle: m.idle}
	for _, p := range m.players {
		a.causes = append(a.causes, Cause{Edits: p.edits, Share: math.NaN()})
	}
	return a
}

// share finds the shares. Where a selection of the edits leaves the member
// without a utilisation, the edits of a declaration that it tears apart are taken
// together, as a new standard and its factors are; where that does not help there
// are none.
func (m *mixture) share(a *attribution, states int) bool {
	for {
		n := len(m.players)
		orders := 0
		var values []float64
		var unknown [][]bool
		if n <= maxExact && 1<<n <= states {
			values, unknown = m.exact()
		} else {
			orders = min(maxOrders, max(2, states/(2*n)))
			values, unknown = m.sampled(orders)
		}
		if unknown == nil {
			m.fill(a, values, orders)
			return true
		}
		torn := m.torn(unknown)
		if len(torn) == 0 {
			*a = m.listed()
			a.why = "with some of the edits alone the utilisation is not known"
			return false
		}
		number := make([]int, len(m.players))
		for i, p := range m.players {
			number[i] = len(m.parts) + i
			for _, at := range p.of {
				if torn[at] {
					number[i] = min(number[i], at)
				}
			}
		}
		m.merge(func(i int) int { return number[i] })
	}
}

// torn are the parts of which a selection makes some of the edits alone.
func (m *mixture) torn(unknown [][]bool) map[int]bool {
	out := map[int]bool{}
	for _, made := range unknown {
		seen := map[int]bool{}
		for i, p := range m.players {
			for _, at := range p.of {
				if was, ok := seen[at]; ok && was != made[i] {
					out[at] = true
				}
				seen[at] = made[i]
			}
		}
	}
	return out
}

// fill writes the causes down, the greatest first.
// orders is 0 for shares that are exact.
func (m *mixture) fill(a *attribution, shares []float64, orders int) {
	n := len(m.players)
	a.causes, a.method, a.why, a.orders, a.idle = nil, Exact, "", 0, m.idle
	if orders > 0 {
		a.method, a.orders = Sampled, 2*orders
	}
	all := make([]bool, n)
	for i := range all {
		all[i] = true
	}
	now := m.check(all).verdict
	for i, p := range m.players {
		all[i] = false
		without := m.check(all)
		all[i] = true
		a.causes = append(a.causes, Cause{Edits: p.edits, Share: shares[i], Without: without.verdict, Turns: without.verdict != now})
	}
	slices.SortStableFunc(a.causes, func(x, y Cause) int {
		switch d := math.Abs(y.Share) - math.Abs(x.Share); {
		case d > 0:
			return 1
		case d < 0:
			return -1
		}
		return 0
	})
}

// exact works out every selection of the edits. The second result are the
// selections in which the utilisation is not known.
func (m *mixture) exact() ([]float64, [][]bool) {
	n := len(m.players)
	values := make([]float64, 1<<n)
	var unknown [][]bool
	for s := range values {
		made := make([]bool, n)
		for i := range made {
			made[i] = s>>i&1 == 1
		}
		if values[s] = m.check(made).utilisation; math.IsNaN(values[s]) {
			unknown = append(unknown, made)
		}
	}
	if unknown != nil {
		return nil, unknown
	}
	// the weight of a selection of k edits: k! (n-k-1)! / n!
	weight := make([]float64, n)
	for k := range weight {
		w := 1 / float64(n)
		for i := 1; i <= k; i++ {
			w *= float64(i) / float64(n-i)
		}
		weight[k] = w
	}
	shares := make([]float64, n)
	for s := range values {
		size := 0
		for i := range n {
			size += s >> i & 1
		}
		for i := range n {
			if s>>i&1 == 0 {
				shares[i] += weight[size] * (values[s|1<<i] - values[s])
			}
		}
	}
	return shares, nil
}

// sampled follows the edits in some orders, each forwards and backwards, and
// takes the mean of what each edit did when its turn came. What they did adds up
// to the whole in every order, so it does in the mean.
func (m *mixture) sampled(orders int) ([]float64, [][]bool) {
	n := len(m.players)
	shares := make([]float64, n)
	r := rand.New(rand.NewPCG(uint64(n), 1))
	var unknown [][]bool
	follow := func(order []int) {
		made := make([]bool, n)
		last := m.check(made).utilisation
		for _, i := range order {
			made[i] = true
			u := m.check(made).utilisation
			if math.IsNaN(u) {
				unknown = append(unknown, slices.Clone(made))
			}
			shares[i] += (u - last) / float64(2*orders)
			last = u
		}
	}
	for range orders {
		order := r.Perm(n)
		follow(order)
		slices.Reverse(order)
		follow(order)
	}
	return shares, unknown
}
