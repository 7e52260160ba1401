//go:build browser

package reportgen

import (
	"bytes"
	"context"
	"errors"
	"math"
	"os"
	"path/filepath"
	"testing"
	"time"

	"github.com/chromedp/chromedp"

	drawing "arrestcheck/reportgen/figure"
)

// shownText is where a browser shows a text, in its own pixels.
type shownText struct {
	Text                     string
	Left, Top, Right, Bottom float64
}

const shownTexts = `[...document.querySelectorAll("text")].map(e => {
	const r = e.getBoundingClientRect();
	return {Text: e.textContent, Left: r.left, Top: r.top, Right: r.right, Bottom: r.bottom};
})`

// Every figure of every job of testdata, as a browser draws it: each text is
// there, no two overlap, none leaves the page, and it prints on one sheet of A4
// and of Letter.
func TestFiguresInBrowser(t *testing.T) {
	ctx := startBrowser(t)
	n := 0
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		for _, kind := range FigureKinds() {
			scene, err := Figure(kind, s, BothUnits)
			var none *NoFigure
			if errors.As(err, &none) {
				continue
			}
			if err != nil {
				t.Fatal(err)
			}
			n++
			showFigure(t, ctx, name+", "+kind, scene)
		}
	}
	if n < 20 {
		t.Errorf("only %d figures were shown", n)
	}
}

// startBrowser starts a browser of its own that asks nobody for anything.
func startBrowser(t *testing.T) context.Context {
	t.Helper()
	options := append(chromedp.DefaultExecAllocatorOptions[:],
		chromedp.NoSandbox, chromedp.DisableGPU, chromedp.UserDataDir(t.TempDir()),
		chromedp.Flag("disable-background-networking", true), chromedp.Flag("force-device-scale-factor", "4"),
		chromedp.WindowSize(1000, 1400),
	)
	ctx, stop := chromedp.NewExecAllocator(context.Background(), options...)
	t.Cleanup(stop)
	ctx, stop = chromedp.NewContext(ctx)
	t.Cleanup(stop)
	ctx, stop = context.WithTimeout(ctx, 5*time.Minute)
	t.Cleanup(stop)
	return ctx
}

func showFigure(t *testing.T, ctx context.Context, name string, scene *drawing.Scene) {
	t.Helper()
	path := filepath.Join(t.TempDir(), "figure.svg")
	if err := os.WriteFile(path, scene.SVG("f"), 0o644); err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Do(ctx, chromedp.Navigate("file://"+path)); err != nil {
		t.Fatal(err)
	}
	texts, err := chromedp.Run(ctx, chromedp.Evaluate[[]shownText](shownTexts))
	if err != nil {
		t.Fatal(err)
	}
	if len(texts) != len(scene.Boxes()) {
		t.Errorf("%s: the browser shows %d texts, not %d", name, len(texts), len(scene.Boxes()))
	}
	const slack, px = 0.3, 96 / 25.4 // a browser rounds boxes of text
	for i, a := range texts {
		if a.Left < -slack || a.Top < -slack || a.Right > drawing.PageWidth*px+slack || math.IsNaN(a.Left) {
			t.Errorf("%s: %q leaves the page: %v", name, a.Text, a)
		}
		for _, b := range texts[:i] {
			if a.Left < b.Right-slack && b.Left < a.Right-slack && a.Top < b.Bottom-slack && b.Top < a.Bottom-slack {
				t.Errorf("%s: %q and %q overlap: %v %v", name, a.Text, b.Text, a, b)
			}
		}
	}
	for _, paper := range []chromedp.PaperSize{chromedp.PaperA4, chromedp.PaperLetter} {
		pdf, err := chromedp.Run(ctx, chromedp.PrintToPDF(chromedp.PDFPaper(paper), chromedp.PDFMargin(20/25.4)))
		if err != nil {
			t.Fatal(err)
		}
		if n := bytes.Count(pdf, []byte("/Type /Page\n")); n != 1 {
			t.Errorf("%s prints on %d sheets", name, n)
		}
	}
}
