package section

var kindNames = [...]string{
	Unknown:  "unknown",
	Tube:     "tube",
	Pipe:     "pipe",
	Bar:      "bar",
	Rod:      "rod",
	ISection: "isection",
	Channel:  "channel",
	Tee:      "tee",
	Angle:    "angle",
	Ellipse:  "ellipse",

	DoubleAngle: "doubleangle",
	Given:       "given",
}

var madeNames = [...]string{
	MadeUnknown: "unknown",
	Rolled:      "rolled",
	Hot:         "hot",
	Cold:        "cold",
	Welded:      "welded",
}

// String is the language's word for the kind, "unknown" for a value that is
// no kind.
func (k Kind) String() string {
	if int(k) < len(kindNames) {
		return kindNames[k]
	}
	return kindNames[Unknown]
}

// String is the language's word for the way of making, "unknown" for a value
// that is none.
func (m Made) String() string {
	if int(m) < len(madeNames) {
		return madeNames[m]
	}
	return madeNames[MadeUnknown]
}
