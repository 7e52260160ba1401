package limits

import (
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
)

func TestEveryQuantityHasASense(t *testing.T) {
	for _, r := range arrest.Quantities() {
		if _, decided := senses[r.ID]; !decided {
			t.Errorf("%s: neither a sense nor none", r.ID)
		}
	}
	if got, want := len(senses), len(arrest.Quantities()); got != want {
		t.Errorf("%d quantities in the table of senses, %d in the list of quantities", got, want)
	}
}

// What must remain is bounded from below, what merely describes is not
// bounded, and all else from above.
func TestSenseOf(t *testing.T) {
	remains := []arrest.Quantity{arrest.ClearanceLeft, arrest.AnchorStrengthPerPerson, arrest.StrengthOverArrestForce}
	describes := []arrest.Quantity{arrest.ShapeRatio, arrest.Momentum, arrest.Impulse, arrest.LegLength,
		arrest.ImpliedFreeFall, arrest.StoppingTime,
		arrest.ImpulseX, arrest.ImpulseY, arrest.ImpulseZ, arrest.ImpulseDirection,
		arrest.StoppingForceX, arrest.StoppingForceY, arrest.StoppingForceZ, arrest.StoppingForceDirection,
		"no_such_quantity"}
	for _, r := range append(arrest.Quantities(), arrest.QuantityRecord{ID: "no_such_quantity"}) {
		want, wantOK := AtMost, true
		switch {
		case slices.Contains(remains, r.ID):
			want = AtLeast
		case slices.Contains(describes, r.ID):
			want, wantOK = "", false
		}
		if got, ok := SenseOf(r.ID); got != want || ok != wantOK {
			t.Errorf("SenseOf(%s) = %q, %v, want %q, %v", r.ID, got, ok, want, wantOK)
		}
	}
}

func TestSidesOfALimit(t *testing.T) {
	cases := []struct {
		sense          Sense
		x              float64
		beyond, inside bool
	}{
		{AtMost, down(8000), false, true},
		{AtMost, 8000, false, true},
		{AtMost, up(8000), true, false},
		{AtMost, nan, false, false},
		{AtMost, inf, true, false},
		{AtMost, -inf, false, false},
		{AtLeast, down(8000), true, false},
		{AtLeast, 8000, false, true},
		{AtLeast, up(8000), false, true},
		{AtLeast, nan, false, false},
		{AtLeast, inf, false, false},
		{AtLeast, -inf, true, false},
	}
	for _, c := range cases {
		if got := c.sense.beyond(c.x, 8000); got != c.beyond {
			t.Errorf("%s: %v beyond 8000: %v", c.sense, c.x, got)
		}
		if got := c.sense.inside(c.x, 8000); got != c.inside {
			t.Errorf("%s: %v inside 8000: %v", c.sense, c.x, got)
		}
	}
}

// The package holds no limit of its own: no number but 0 and 1 stands in it.
func TestNoFigureInTheCode(t *testing.T) {
	files, err := os.ReadDir(".")
	if err != nil {
		t.Fatal(err)
	}
	parsed := 0
	for _, f := range files {
		if !strings.HasSuffix(f.Name(), ".go") || strings.HasSuffix(f.Name(), "_test.go") {
			continue
		}
		src, err := os.ReadFile(f.Name())
		if err != nil {
			t.Fatal(err)
		}
		for _, n := range figures(t, f.Name(), src) {
			t.Errorf("%s: the number %s", f.Name(), n)
		}
		parsed++
	}
	if parsed == 0 {
		t.Fatal("no file of the package was read")
	}
	planted := []byte("package p\nconst Most = 1800\nvar x, y = 0, 1.5\n")
	if got := figures(t, "planted.go", planted); !slices.Equal(got, []string{"1800", "1.5"}) {
		t.Errorf("planted figures found: %v", got)
	}
}

func figures(t *testing.T, name string, src []byte) []string {
	t.Helper()
	tree, err := parser.ParseFile(token.NewFileSet(), name, src, 0)
	if err != nil {
		t.Fatal(err)
	}
	var found []string
	ast.Inspect(tree, func(n ast.Node) bool {
		lit, ok := n.(*ast.BasicLit)
		if ok && lit.Kind != token.STRING && lit.Value != "0" && lit.Value != "1" {
			found = append(found, lit.Value)
		}
		return true
	})
	return found
}
