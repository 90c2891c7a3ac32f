package symmetry

import (
	"fmt"
	"strconv"
	"strings"
)

// ParseOrder reads the order [i,j] of a sigmatropic shift as it is written: "3,3",
// "[1,5]".
func ParseOrder(text string) (i, j int, err error) {
	a, b, ok := strings.Cut(strings.Trim(text, "[] "), ",")
	i, err1 := strconv.Atoi(strings.TrimSpace(a))
	j, err2 := strconv.Atoi(strings.TrimSpace(b))
	if !ok || err1 != nil || err2 != nil || i < 1 || j < 1 || i > 99 || j > 99 {
		return 0, 0, fmt.Errorf("%q is no order of a sigmatropic shift; write two numbers, for instance \"3,3\" or \"1,5\"", text)
	}
	return i, j, nil
}
