//go:build browser

package figure

import (
	"bytes"
	"context"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"testing"
	"time"

	"github.com/chromedp/chromedp"
)

// rendered is what a browser makes of a text, in its own pixels.
type rendered struct {
	Text                     string
	Left, Top, Right, Bottom float64
	Natural                  float64 // width of the text without a fixed length, mm
	Fixed                    float64 // the fixed length, mm; 0 if there is none
}

// script measures all texts of the page and its svg elements.
const script = `(() => {
	const box = e => { const r = e.getBoundingClientRect(); return {Left: r.left, Top: r.top, Right: r.right, Bottom: r.bottom} };
	const texts = [...document.querySelectorAll("text")].map(e => {
		const at = box(e), fixed = parseFloat(e.getAttribute("textLength") || "0");
		e.removeAttribute("textLength"); e.removeAttribute("lengthAdjust");
		return {Text: e.textContent, ...at, Natural: e.getComputedTextLength() / 100, Fixed: fixed / 100};
	});
	return {Texts: texts, Figures: [...document.querySelectorAll("svg")].map(box), Width: innerWidth, Height: innerHeight};
})()`

type measured struct {
	Texts         []rendered
	Figures       []Box
	Width, Height float64
}

// browser starts a browser of its own that asks nobody for anything.
func browser(t *testing.T) context.Context {
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
	ctx, stop = context.WithTimeout(ctx, 2*time.Minute)
	t.Cleanup(stop)
	return ctx
}

// show opens a page and measures its texts.
func show(t *testing.T, ctx context.Context, name string, content []byte) measured {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	if err := os.WriteFile(path, content, 0o644); err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Do(ctx, chromedp.Navigate("file://"+path)); err != nil {
		t.Fatal(err)
	}
	m, err := chromedp.Run(ctx, chromedp.Evaluate[measured](script))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// checkRendered fails if texts overlap as the browser draws them, one leaves
// the page, or one is wider than the place that is kept for it.
func checkRendered(t *testing.T, name string, m measured, texts int) {
	t.Helper()
	if len(m.Texts) != texts {
		t.Fatalf("%s: the browser shows %d texts, not %d", name, len(m.Texts), texts)
	}
	const slack = 0.3 // px; a browser rounds boxes of text
	for i, a := range m.Texts {
		if a.Left < -slack || a.Top < -slack || a.Right > m.Width+slack {
			t.Errorf("%s: %q leaves the page: %v", name, a.Text, a)
		}
		if a.Fixed > 0 && math.Abs(a.Natural-a.Fixed) > 0.03*a.Fixed+0.05 {
			t.Errorf("%s: %q is %.2f mm wide in this font, not %.2f; is Liberation Sans installed?", name, a.Text, a.Natural, a.Fixed)
		}
		for _, b := range m.Texts[:i] {
			if a.Left < b.Right-slack && b.Left < a.Right-slack && a.Top < b.Bottom-slack && b.Top < a.Bottom-slack {
				t.Errorf("%s: %q and %q overlap: %v %v", name, a.Text, b.Text, a, b)
			}
		}
	}
}

func TestInBrowser(t *testing.T) {
	ctx := browser(t)
	var all bytes.Buffer
	all.WriteString("<!DOCTYPE html><title>figures</title><body style='margin:10mm'>")
	texts := 0
	for _, s := range append(samples(t), sample{"turned", turned()}, sample{"hostile", hostileScene()}) {
		svg := s.scene.SVG(s.name)
		m := show(t, ctx, s.name+".svg", svg)
		checkRendered(t, s.name, m, len(s.scene.Boxes()))
		width, height := s.scene.Size()
		f := m.Figures[0]
		const px = 96 / 25.4
		if math.Abs(f.Right-f.Left-width*px) > 1 || math.Abs(f.Bottom-f.Top-height*px) > 1 {
			t.Errorf("%s is %.1f px by %.1f px, not %.1f by %.1f", s.name, f.Right-f.Left, f.Bottom-f.Top, width*px, height*px)
		}
		checkPages(t, ctx, s.name)
		fmt.Fprintf(&all, "<p>%s</p>\n%s", s.name, svg)
		texts += len(s.scene.Boxes())
	}
	checkRendered(t, "all on one page", show(t, ctx, "all.html", all.Bytes()), texts)
}

// checkPages fails if the page that is shown does not print on one sheet of A4
// and of Letter with margins of 20 mm.
func checkPages(t *testing.T, ctx context.Context, name string) {
	t.Helper()
	const margin = 20 / 25.4
	for _, sheet := range []chromedp.PaperSize{chromedp.PaperA4, chromedp.PaperLetter} {
		pdf, err := chromedp.Run(ctx, chromedp.PrintToPDF(chromedp.PDFPaper(sheet), chromedp.PDFMargin(margin)))
		if err != nil {
			t.Fatal(err)
		}
		if n := bytes.Count(pdf, []byte("/Type /Page\n")); n != 1 {
			t.Errorf("%s prints on %d sheets of %v in", name, n, sheet)
		}
	}
}

// turned has texts that read upwards, one over a line.
func turned() *Scene {
	s := NewScene("Turned texts", 60)
	s.Line(Point{20, 0}, Point{20, 60}, Pen{Weight: Medium})
	for i, lift := range []Lift{OnLine, Above, Below} {
		for k, anchor := range []Anchor{Start, Middle, End} {
			at := Point{40 + float64(i)*15 + float64(k)*30, 30}
			s.Mark(at, Cross)
			s.Text(Text{Text: "peak 6 kN", Turned: true, Rank: RankNote, Spots: []Spot{{At: at, Anchor: anchor, Lift: lift, Gap: 1}}})
		}
	}
	return s
}

// hostileScene has every hostile text as a label and as title.
func hostileScene() *Scene {
	s := NewScene("", 56)
	for i, text := range hostile {
		s.Title += text
		s.Notes = append(s.Notes, text)
		at := Point{5 + float64(i%3)*55, 5 + float64(i/3)*8}
		s.Text(Text{Text: text, Rank: RankNote, Spots: []Spot{{At: at, Anchor: Start}}})
	}
	s.Desc, s.Stamp, s.Statement = s.Title, s.Title, s.Title
	return s
}
