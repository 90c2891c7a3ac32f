package review

import (
	"fmt"
	"testing"
)

// Pericyclic steps as reactions, under heat and under light: the verdicts of the
// Woodward–Hoffmann rules as textbooks give them (R. B. Woodward, R. Hoffmann, Angew. Chem.
// Int. Ed. Engl. 1969, 8, 781), where the product leaves its configuration open as well.
func TestPericyclicReactions(t *testing.T) {
	for _, c := range []struct{ reaction, activation, want string }{
		// electrocyclic, 4 and 6 electrons
		{"C=CC=C>>C1CC=C1", "thermal", "supported"},
		{"C=CC=C>>C1CC=C1", "photochemical", "supported"},
		{"C1CC=CC=CC1>>C1CC2C=CC2C1", "photochemical", "supported"},
		{"C1CC=CC=CC1>>C1CC2C=CC2C1", "thermal", "forbidden"}, // conrotation cannot fuse the rings
		{"C1C=CC=CC1>>C=CC=CC=C", "thermal", "supported"},
		{"C1=CC2C=CC12>>c1ccccc1", "thermal", "forbidden"}, // Dewar benzene
		{"C1=CC2C=CC12>>c1ccccc1", "photochemical", "supported"},
		{"C1=CC=CC=CC=C1>>C1=C[C@H]2C=C[C@H]2C=C1", "thermal", "supported"}, // cyclooctatetraene: six electrons
		{"C1=CC=CC=CC=C1>>C1=C[C@H]2C=C[C@@H]2C=C1", "thermal", "forbidden"},
		// [2+2]
		{"C=C.C=C>>C1CCC1", "photochemical", "supported"},
		{"C=C.C=C>>C1CCC1", "thermal", "forbidden"},
		{"O=C1C=CCC1.C=C>>O=C1C2CCC2CC1", "photochemical", "supported"},
		{"O=C=C(C)C.C1=CCCC1>>O=C1C(C)(C)C2CCCC12", "thermal", "supported"}, // a ketene
		{"C1=CC2CC1C=C2>>C1C2C3C2C2C1C32", "photochemical", "supported"},    // quadricyclane
		// retro-Diels–Alder
		{"C1=CCCCC1>>C=CC=C.C=C", "thermal", "supported"},
		{"C1C=CC2C1C1C=CC2C1>>C1C=CC=C1", "thermal", "supported"},
		{"O=S1(=O)CC=CC1>>C=CC=C", "thermal", "supported"}, // SO2 is lost
		// [3,3], with the enol going over to the ketone
		{"C=CC(O)(C)CC=C>>CC(=O)CCCC=C", "thermal", "supported"},
		{"C=CCOC=C>>C=CCCC=O", "thermal", "supported"},
	} {
		r := reviewed(t, fmt.Sprintf("[[step]]\nreaction = %q\nactivation = %q\n", c.reaction, c.activation))
		if got := r.Step[0].Standing; got != c.want {
			t.Errorf("%s, %s: %s (%s), want %s", c.reaction, c.activation, got, r.Step[0].Reason, c.want)
		}
	}
}
