package complete

// shapeProperty is a property in the block of a shape.
type shapeProperty struct {
	word   string
	needed bool     // the shape cannot do without it
	words  []string // the words that it takes, nil for a quantity
}

func needs(word string) shapeProperty { return shapeProperty{word: word, needed: true} }
func may(word string) shapeProperty   { return shapeProperty{word: word} }
func made(words ...string) shapeProperty {
	return shapeProperty{word: "made", words: words}
}

// shapeWords are the shapes with the properties of each, in the order in which
// they are offered. A test holds it against what the checker reads.
var shapeWords = map[string][]shapeProperty{
	"tube":        {needs("width"), may("depth"), needs("wall"), may("corner"), made("hot", "cold", "welded")},
	"pipe":        {needs("outside"), needs("wall"), made("hot", "cold", "welded")},
	"bar":         {needs("width"), may("depth")},
	"rod":         {needs("diameter")},
	"isection":    {needs("depth"), needs("width"), needs("web"), needs("flange"), may("root"), made("rolled", "welded")},
	"channel":     {needs("depth"), needs("width"), needs("web"), needs("flange"), may("root"), may("toe"), made("rolled", "welded")},
	"tee":         {needs("depth"), needs("width"), needs("web"), needs("flange"), may("root"), made("rolled", "welded")},
	"angle":       {needs("depth"), may("width"), needs("wall"), may("root"), may("toe"), made("rolled", "welded")},
	"doubleangle": {needs("depth"), may("width"), needs("wall"), may("gap"), may("root"), may("toe"), made("rolled", "welded")},
	"given": {needs("A"), needs("I_major"), needs("I_minor"), may("W_major"), may("W_minor"), may("Wpl_major"), may("Wpl_minor"), may("A_v_major"),
		may("A_v_minor"), may("I_t"), may("I_w"), may("thickness"), may("class"), may("curve"), may("curve_major"), may("curve_minor")},
}

// shapeOrder is the order in which shapes are offered.
var shapeOrder = []string{"tube", "pipe", "isection", "channel", "tee", "angle", "doubleangle", "bar", "rod", "given"}

// madeWords are the ways of making that a shape can have; nil for any.
func madeWords(shape string) []string {
	for _, p := range shapeWords[shape] {
		if p.word == "made" {
			return p.words
		}
	}
	return nil
}
