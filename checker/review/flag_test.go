package review_test

import "flag"

var many = flag.Int("many", 0, "number of random pairs of states to review")
