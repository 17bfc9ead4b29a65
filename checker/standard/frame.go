package standard

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/model"
	"kern/lang"
	"kern/lang/unit"
)

// Frame is a member as every standard starts from it: its stretches between
// holds, and the axial force and moments of each combination. Of a member of
// several lifts a standard sees one frame a lift: the member then has the section
// of the lift, and forces and heights are those within it.
type Frame struct {
	Member       *model.Member
	Env          *model.Env
	Combinations []model.Combination

	// From and To are the heights above the base between which the frame looks at
	// the member, m: 0 and the height for a member of one section.
	From, To float64

	// Stretches between points held against buckling about major and minor;
	// Stands is false about an axis for a mechanism, and where effective lengths
	// cannot tell: NotHeld says why. Where Exact is set, the critical load is that of
	// the whole member and depends on the combination: Under gives the stretches
	// their factors, and here they have the greatest of all combinations.
	Stretches [2][]action.Stretch
	Stands    [2]bool
	Exact     [2]bool
	// Twist is the greatest distance between points held against twist; with
	// TwistFree an end can turn about the member's own axis.
	Twist     float64
	TwistK    float64 // the user's factor on it, 1 otherwise
	TwistFree bool

	// Bends tells about which axes there is bending; Pushed where it comes (also)
	// from loads across the member.
	Bends, Pushed [2]bool

	cuts        []float64   // heights where the axial force or the section changes, from 0 to the height
	first, last int         // the segments between From and To
	axial       [][]float64 // [combination][segment] compression at the segment's bottom
	own         []float64   // [segment] self-weight per length
	weight      []float64   // [combination] the factor of self-weight
	slope       [][]float64 // [combination][segment] loss of compression per length, of imported forces alone
	beams       [2][][]action.Piece
	beamOK      [2]bool
	pushes      [2][][]action.Push // [axis][case] what acts across, with the forces of imperfections behind
	loadFactor  [2][]float64       // [axis][combination] load factor at which the whole member buckles, where Exact
	sprung      [2]bool            // a spring leaves effective lengths without an answer

	parts  []model.Lift // neighbouring lifts of one section and material taken as one
	twists []Segment    // between points held against twist
	floors []floors     // [case][segment] what floors bring, for reductions; nil for none
	lift   *liftView    // of a frame of one lift
	needs  []HoldDemand // what Holds found, nil before
	stated []HoldDemand // what statedHolds found, nil before
}

// Segment is a part of the height between two points that are held, m.
type Segment struct {
	From, To float64
	// Factor is what its length is to be multiplied with where the section
	// changes in it, 1 elsewhere; see Frame.Lateral.
	Factor float64
}

// NewFrame works out the mechanics of a member that lacks nothing.
func NewFrame(env *model.Env, m *model.Member, combinations []model.Combination) *Frame {
	f := &Frame{Member: m, Env: env, Combinations: combinations, TwistK: 1, To: m.Height, parts: merged(m.Parts())}
	f.split()
	f.forces()
	f.critical()
	f.moments()
	return f
}

// split finds the stretches about each axis and between points held in twist.
func (f *Frame) split() {
	m := f.Member
	for axis := range f.Stretches {
		holds := m.RigidHolds(model.Axis(axis))
		f.Exact[axis] = m.Exact && m.Factor[axis] == 0 && m.Joints[axis] == nil && !f.Env.Basis.Direct // each says K
		if f.Exact[axis] {
			f.Stretches[axis] = f.spans(axis)
			continue
		}
		f.Stretches[axis], f.Stands[axis] = action.Stretches(m.Base[axis], m.Top[axis], holds, m.Height, f.Env.Basis.Recommended)
		if j := m.Joints[axis]; j != nil {
			f.Stretches[axis] = []action.Stretch{{From: 0, To: m.Height, Base: m.Base[axis], Top: m.Top[axis], K: j.Factor(), Joints: true, Sway: j.Sway}}
			f.Stands[axis] = true
		}
		if f.Env.Basis.Direct && f.Stands[axis] {
			for i := range f.Stretches[axis] {
				s := &f.Stretches[axis][i]
				s.K, s.Exact, s.Joints, s.Direct = 1, false, false, true
			}
		}
		if k := m.Factor[axis]; k > 0 {
			if !f.Stands[axis] || len(f.Stretches[axis]) == 1 && f.Stretches[axis][0].Exact {
				f.Stretches[axis] = []action.Stretch{{From: 0, To: m.Height, Base: m.Base[axis], Top: m.Top[axis]}}
				f.Stands[axis] = true
			}
			for i := range f.Stretches[axis] {
				s := &f.Stretches[axis][i]
				s.K, s.Overridden, s.Exact, s.Direct = k, true, false, false
			}
		} else if m.Sprung(model.Axis(axis)) {
			f.Stands[axis], f.sprung[axis] = false, true
		}
	}
	last := 0.0
	for _, h := range m.Holds {
		if h.Twist {
			f.twists = append(f.twists, Segment{last, h.At, 1})
			last = h.At
		}
	}
	f.twists = append(f.twists, Segment{last, m.Height, 1})
	for _, t := range f.twists {
		f.Twist = max(f.Twist, t.To-t.From)
	}
	f.TwistFree = m.Top[0] == action.Free || m.Top[1] == action.Free || m.Base[0] == action.Free || m.Base[1] == action.Free
	if k := m.Factor[2]; k > 0 {
		f.TwistK, f.TwistFree = k, false
	}
}

// forces adds up the axial force from the top down.
func (f *Frame) forces() {
	m := f.Member
	f.cuts = append(f.cuts, 0)
	insert := func(z float64) {
		for i, c := range f.cuts {
			if math.Abs(c-z) <= 1e-9*m.Height {
				return
			}
			if z < c {
				f.cuts = append(f.cuts[:i], append([]float64{z}, f.cuts[i:]...)...)
				return
			}
		}
		f.cuts = append(f.cuts, z)
	}
	insert(m.Height)
	for _, h := range m.Holds {
		insert(h.At)
	}
	for _, l := range f.parts[1:] {
		insert(l.From)
	}
	for _, l := range m.Loads {
		if l.Kind == model.AxialLoad {
			insert(l.At)
		}
	}
	if in := m.Imported; in != nil {
		for _, z := range in.Positions[1 : len(in.Positions)-1] {
			insert(z)
		}
		f.importedForces(in)
		return
	}
	segments := len(f.cuts) - 1
	f.last = segments - 1
	of := f.byCase()
	f.reduce()
	f.own = make([]float64, segments)
	if m.Weight {
		for s := range f.own {
			l := f.partAt((f.cuts[s] + f.cuts[s+1]) / 2)
			f.own[s] = l.Material.Density * l.Section.Area * unit.StandardGravity
		}
	}
	f.axial = make([][]float64, len(f.Combinations))
	f.weight = make([]float64, len(f.Combinations))
	flat := make([]float64, len(f.Combinations)*segments)
	for c, combination := range f.Combinations {
		row := flat[c*segments : (c+1)*segments]
		for k, factor := range combination.Factors {
			if factor != 0 && k < len(f.Env.Cases) { // behind the cases stand forces of imperfections
				for s := range row {
					row[s] += factor * (of[k*segments+s] - f.relief(c, k, s))
				}
			}
		}
		f.weight[c] = f.ownFactor(combination)
		above := 0.0
		for s := segments - 1; s >= 0; s-- {
			above += f.weight[c] * f.own[s] * (f.cuts[s+1] - f.cuts[s])
			row[s] += above
		}
		f.axial[c] = row
	}
}

// byCase adds up the loads along the member by case: [case][segment], N.
func (f *Frame) byCase() []float64 {
	m := f.Member
	segments := len(f.cuts) - 1
	of := make([]float64, len(f.Env.Cases)*segments)
	for _, l := range m.Loads {
		if l.Kind != model.AxialLoad {
			continue
		}
		for s := range segments {
			if f.cuts[s+1] <= l.At+1e-9*m.Height {
				of[l.Case*segments+s] += l.Value
			}
		}
	}
	return of
}

// CaseForce is the axial force just below a height from one case, without factors
// and reductions, N, compression positive; self-weight counts in its case.
func (f *Frame) CaseForce(c int, z float64) float64 {
	eps := 1e-9 * f.Member.Height
	n := 0.0
	for _, l := range f.Member.Loads {
		if l.Kind == model.AxialLoad && l.Case == c && l.At >= z-eps {
			n += l.Value
		}
	}
	if c == f.Env.SelfWeight {
		for s, own := range f.own {
			n += own * max(0, f.cuts[s+1]-max(z, f.cuts[s]))
		}
	}
	return n
}

// partAt is the part of the member that a height lies in.
func (f *Frame) partAt(z float64) *model.Lift {
	for i := range f.parts {
		if z < f.parts[i].To || i == len(f.parts)-1 {
			return &f.parts[i]
		}
	}
	return nil
}

// ownFactor is the factor that self-weight has in a combination: that of the
// permanent case it belongs to; a combination written out that leaves this case
// out takes the greatest factor of its permanent cases, or 1.
func (f *Frame) ownFactor(c model.Combination) float64 {
	if v := c.Factors[f.Env.SelfWeight]; v != 0 || c.Label == "" {
		return v
	}
	factor := 0.0
	for i, k := range f.Env.Cases {
		if k.Kind == action.Permanent {
			factor = max(factor, c.Factors[i])
		}
	}
	if factor == 0 {
		return 1
	}
	return factor
}

// Compression is the greatest compression of a combination between two
// heights, N; negative when there is tension throughout.
func (f *Frame) Compression(combination int, from, to float64) float64 {
	most := math.Inf(-1)
	eps := 1e-9 * f.Member.Height
	for s := f.first; s <= f.last; s++ {
		if f.cuts[s+1] > from+eps && f.cuts[s] < to-eps {
			most = max(most, f.axial[combination][s], f.top(combination, s))
		}
	}
	return most
}

// Tension is the greatest tension of a combination anywhere, N; negative when
// there is compression throughout.
func (f *Frame) Tension(combination int) float64 {
	most := math.Inf(-1)
	for s := f.first; s <= f.last; s++ {
		most = max(most, -f.axial[combination][s], -f.top(combination, s))
	}
	return most
}

// At is the compression of a combination at a height, N; at a height where a
// load comes in, the value below it.
func (f *Frame) At(combination int, z float64) float64 {
	eps := 1e-9 * f.Member.Height
	for s := f.last; s >= f.first; s-- {
		if f.cuts[s] < z-eps || s == f.first {
			return f.axial[combination][s] - f.perLength(combination, s)*(max(z, f.cuts[s])-f.cuts[s])
		}
	}
	return math.NaN()
}

// perLength is what compression loses per length from the base up in a segment
// under a combination, N/m: the self-weight.
func (f *Frame) perLength(combination, segment int) float64 {
	if f.slope != nil {
		return f.slope[combination][segment]
	}
	return f.weight[combination] * f.own[segment]
}

func (f *Frame) top(combination, segment int) float64 {
	return f.axial[combination][segment] - f.perLength(combination, segment)*(f.cuts[segment+1]-f.cuts[segment])
}

// Between gives the compression of a combination just above one height and just
// below another, N; no load may come in between the two.
func (f *Frame) Between(combination int, from, to float64) (bottom, top float64) {
	middle := (from + to) / 2
	for s := f.last; s >= f.first; s-- {
		if f.cuts[s] < middle || s == f.first {
			n, w := f.axial[combination][s], f.perLength(combination, s)
			return n - w*(from-f.cuts[s]), n - w*(to-f.cuts[s])
		}
	}
	return math.NaN(), math.NaN()
}

// Heights are where the axial force can have its extremes.
func (f *Frame) Heights() []float64 { return f.cuts[f.first : f.last+2] }

// Cut is what of a piece of the moments lies within the frame, false for nothing.
func (f *Frame) Cut(p action.Piece) (action.Piece, bool) {
	eps := 1e-9 * f.Member.Height
	if p.From >= f.From-eps && p.To <= f.To+eps {
		return p, true
	}
	if p.To <= f.From+eps || p.From >= f.To-eps {
		return p, false
	}
	return p.Cut(max(p.From, f.From), min(p.To, f.To)), true
}

// moments analyses the member as a beam about each axis that is bent.
func (f *Frame) moments() {
	m := f.Member
	if m.Imported != nil {
		f.importedMoments(m.Imported)
		return
	}
	for _, l := range m.Loads {
		switch l.Kind {
		case model.AxialLoad:
			for a, e := range l.Offset {
				f.Bends[a] = f.Bends[a] || e != 0 && l.Value != 0
			}
		case model.EndMoment:
			f.Bends[l.Axis] = f.Bends[l.Axis] || l.Value != 0
		default:
			f.Bends[l.Axis] = f.Bends[l.Axis] || l.Value != 0
			f.Pushed[l.Axis] = f.Pushed[l.Axis] || l.Value != 0
		}
	}
	for axis := range f.Bends {
		if f.Imperfect() && m.Sways(model.Axis(axis)) {
			f.Bends[axis], f.Pushed[axis] = true, true
		}
	}
	for axis, bends := range f.Bends {
		if !bends {
			continue
		}
		beam := action.Beam{Base: m.Base[axis], Top: m.Top[axis], Height: m.Height}
		beam.Holds = m.RigidHolds(model.Axis(axis))
		beam.Springs = f.springs(axis)
		if len(f.parts) > 1 {
			beam.Steps = f.steps(axis, 0, m.Height)
		}
		loadings := make([][]action.Push, len(f.Env.Cases))
		for _, l := range m.Loads {
			p := action.Push{From: l.At}
			switch {
			case l.Kind == model.AxialLoad && l.Offset[axis] != 0:
				if !m.Nominal {
					p.Moment = l.Value * l.Offset[axis]
				}
			case l.Kind == model.AxialLoad || int(l.Axis) != axis:
				continue
			case l.Kind == model.EndMoment:
				p.Moment = l.Value
			case l.Kind == model.PointLoad:
				p.Force = l.Value
			case l.Kind == model.LineLoad:
				p.Line, p.To = l.Value, l.To
			}
			loadings[l.Case] = append(loadings[l.Case], p)
		}
		if f.Imperfect() {
			loadings = append(loadings, f.notional(axis)...)
		}
		f.pushes[axis] = loadings
		pieces, err := beam.Solve(loadings)
		if m.Nominal {
			for c := range min(len(pieces), len(f.Env.Cases)) {
				f.nominal(axis, c, pieces[c])
			}
		}
		f.beams[axis], f.beamOK[axis] = pieces, err == nil
	}
}

// Bending gives the first-order moments of a combination about an axis, in
// pieces from the base up. It is false when the member cannot stand; without
// bending it is empty.
func (f *Frame) Bending(axis int, factors []float64, into []action.Piece) ([]action.Piece, bool) {
	if !f.Bends[axis] {
		return into[:0], true
	}
	if !f.beamOK[axis] {
		return into[:0], false
	}
	return action.Add(f.beams[axis], factors, into), true
}

// StretchName says in words which part of the member a stretch is.
func (f *Frame) StretchName(axis int, s action.Stretch) string {
	if s.From <= 0 && s.To >= f.Member.Height {
		return "the whole height"
	}
	return fmt.Sprintf("the stretch from %s to %s", f.Place(s.From), f.Place(s.To))
}

// Place is a height in words: in metres, or in feet where the basis shows US
// customary units.
func (f *Frame) Place(z float64) string {
	return f.Env.Basis.Show.Place(z)
}

func number(x float64) string { return unit.Exact(math.Round(x*1e4) / 1e4) }

// Assumptions are the assumptions that every standard shares.
func (f *Frame) Assumptions() []string {
	m := f.Member
	out := append([]string(nil), m.Assumed...)
	out = append(out, m.Section.Assumed...)
	out = append(out, m.Material.Assumed...)
	for axis, name := range []string{"major", "minor"} {
		if f.Exact[axis] {
			out = append(out, "critical loads about "+name+" of the whole member under each combination, by its stiffness matrix with its holds, springs and stepped forces (critical exact)")
			continue
		}
		for _, s := range f.Stretches[axis] {
			if f.Stepped(s.From, s.To) {
				continue // said for the lift
			}
			kind := "theoretical"
			switch {
			case s.Overridden:
				kind = "stated"
			case s.Direct:
				kind = "the unbraced length, by direct analysis"
			case s.Joints:
				j := m.Joints[axis]
				sway := "without sway"
				if j.Sway {
					sway = "with sway"
				}
				kind = fmt.Sprintf("alignment chart %s, stiffness ratios %s at the base and %s at the top", sway, number(j.Base), number(j.Top))
			case s.Exact:
				kind = "solved for the whole column, as its free end stands beyond a hold"
			case f.Env.Basis.Recommended:
				kind = "recommended for design"
			}
			out = append(out, fmt.Sprintf("K = %s %s over %s (%s–%s, %s)", unit.Short(s.K, 3), name, f.StretchName(axis, s), s.Base, s.Top, kind))
		}
	}
	if m.Imported != nil {
		if m.Reduction.Kind != model.NoReduction {
			out = append(out, "forces of a table are not reduced, whatever the calculation says of imposed loads")
		}
		out = append(out, importedAssumptions(m.Imported)...)
		return append(out, f.swayAssumptions()...)
	}
	switch {
	case m.Weight:
		c := f.Env.Cases[f.Env.SelfWeight].Name
		own := f.Env.Basis.Show.Short(f.OwnWeight(), unit.Force, 3)
		out = append(out, fmt.Sprintf("self-weight %s in all, in case %s", own, c))
	case m.Kind == model.Column:
		out = append(out, "self-weight not counted")
	}
	out = append(out, f.swayAssumptions()...)
	out = append(out, f.reductions()...)
	if m.Nominal && (f.Bends[0] || f.Bends[1]) {
		out = append(out, "nominal moments of simple construction: each load off the centroid bends the lengths of column above and below its level alone, in proportion to I/L, or in halves where these differ by no more than 1.5 (common practice, from memory)")
	}
	if f.Env.Basis.Actions == "" {
		if len(f.Env.Automatic) == 0 {
			out = append(out, "only the combinations written out are checked (no actions standard is stated)")
		} else {
			out = append(out, "all cases summed with factor 1 (no actions standard is stated)")
		}
	}
	return out
}

// ByLeg is why a standard that takes an angle as loaded in its centroid leaves one
// undecided that is connected by one leg.
const ByLeg = "the angle is connected by one leg: allow for the eccentricity by hand"

// OwnWeight is the whole weight of the member where it counts, N.
func (f *Frame) OwnWeight() float64 {
	w := 0.0
	for s, own := range f.own {
		w += own * (f.cuts[s+1] - f.cuts[s])
	}
	return w
}

// Utilisation judges a demand against a capacity: undecided unless both are
// finite and the capacity is positive.
func Utilisation(u, limit float64) Verdict {
	switch {
	case math.IsNaN(u) || math.IsInf(u, 0) || u < 0:
		return Undecided
	case u <= limit:
		return Passes
	}
	return Fails
}

// Limit is the utilisation that the member may reach.
func (f *Frame) Limit() float64 {
	if l := f.Member.Limits.Utilisation; l > 0 {
		return l
	}
	return 1
}

// NameOf cuts a place's text out, for messages.
func NameOf(p lang.Place) string {
	if p.Decl == nil {
		return ""
	}
	return p.Span.Of(p.Decl.Text)
}
