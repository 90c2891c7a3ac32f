package reactivity

import "math/rand/v2"

// newRandom is a reproducible source of random numbers.
func newRandom(seed uint64) *rand.Rand { return rand.New(rand.NewPCG(seed, 0x6c6f626563617374)) }
