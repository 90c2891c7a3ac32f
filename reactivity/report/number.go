package report

import "math"

// Round rounds first to 1e-9 and then to four decimals, so that noise of the last
// bits cannot tip a printed digit; −0 becomes 0.
func Round(x float64) float64 {
	x = math.Round(x*1e9) / 1e9
	x = math.Round(x*1e4) / 1e4
	if x == 0 {
		return 0
	}
	return x
}

// Num is a printed number: rounded, or nil where x is not finite.
func Num(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	x = Round(x)
	return &x
}

// Limits is a printed interval, or nil where p is nil or not finite.
func Limits(p *[2]float64) *[2]float64 {
	if p == nil {
		return nil
	}
	a, b := Num(p[0]), Num(p[1])
	if a == nil || b == nil {
		return nil
	}
	return &[2]float64{*a, *b}
}

// Chance is a printed chance: two decimals are what the data carry, but four are
// kept so that rows can be added up.
func Chance(p *float64) *float64 {
	if p == nil {
		return nil
	}
	return Num(*p)
}
