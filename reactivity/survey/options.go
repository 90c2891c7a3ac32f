package survey

import (
	"fmt"
	"strconv"
	"strings"

	"lobecast/frontier"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
)

// Options of a run.
type Options struct {
	Set      *frontier.Set
	Medium   terms.Medium         // "" or unknown: the agents decide
	Toward   terms.Toward         // for structures; "" is electrophile, or as Incoming comes
	Incoming *reactivity.Incoming // for structures, nil where not stated
	NoLimits bool
	CSV      bool
	Brief    bool // a table for reading instead of records
	Shard    Shard
	Where    *Filter
	Top      int // keep the N most doubtful records, 0 for all
	Workers  int // 0: one for each core
}

func (o *Options) conditions() reactivity.Conditions {
	return reactivity.Conditions{Set: o.Set, Medium: o.Medium, NoLimits: o.NoLimits, Terse: true}
}

// towards is the kind of attack that structures are ranked for.
func (o *Options) towards() []terms.Toward {
	switch {
	case o.Toward != "":
		return []terms.Toward{o.Toward}
	case o.Incoming != nil:
		return o.Incoming.Towards()[:1]
	}
	return []terms.Toward{terms.Electrophile}
}

// Shard is one part of a run split over several processes: every N-th line, beginning
// with line I (from 1). The zero value is the whole run.
type Shard struct{ I, N int }

// ParseShard reads "3/16".
func ParseShard(s string) (Shard, error) {
	a, b, ok := strings.Cut(s, "/")
	i, err1 := strconv.Atoi(a)
	n, err2 := strconv.Atoi(b)
	if !ok || err1 != nil || err2 != nil || n < 1 || i < 1 || i > n {
		return Shard{}, fmt.Errorf("%q is no shard; write its number and the number of all, for instance 3/16", s)
	}
	return Shard{i, n}, nil
}

func (s Shard) takes(line int) bool { return s.N <= 1 || (line-1)%s.N == s.I-1 }
