package frontier

import (
	"fmt"
	"strconv"
	"strings"
)

// ParseTwist reads a twist as it is written: two atom numbers and an angle in degrees,
// "4-7=40".
func ParseTwist(text string) (Twist, error) {
	bad := fmt.Errorf("%q is no twist: write the two atom numbers and the angle, for instance 4-7=40", text)
	pair, angle, ok := strings.Cut(text, "=")
	a, b, ok2 := strings.Cut(pair, "-")
	if !ok || !ok2 {
		return Twist{}, bad
	}
	i, err1 := strconv.Atoi(strings.TrimSpace(a))
	j, err2 := strconv.Atoi(strings.TrimSpace(b))
	deg, err3 := strconv.ParseFloat(strings.TrimSpace(angle), 64)
	if err1 != nil || err2 != nil || err3 != nil || i < 1 || j < 1 || i == j || !(deg >= -360 && deg <= 360) {
		return Twist{}, bad
	}
	return Twist{A: i, B: j, Degrees: deg}, nil
}
