package reportgen

import (
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"
)

func TestPrintable(t *testing.T) {
	for _, c := range []struct{ name, in, out, ascii string }{
		{"plain", "a|b <b>c</b> *d*", "a|b <b>c</b> *d*", "a|b <b>c</b> *d*"},
		{"line breaks and tabs", "a\r\nb\tc", "a  b c", "a  b c"},
		{"colour escape", "\x1b[31mred\x1b[0m", `\u001b[31mred\u001b[0m`, `\u001b[31mred\u001b[0m`},
		{"title escape with bell", "\x1b]0;x\a", `\u001b]0;x\u0007`, `\u001b]0;x\u0007`},
		{"eight-bit escape", "a\u009b2J", `a\u009b2J`, `a\u009b2J`},
		{"delete, nul", "a\x7f\x00", `a\u007f\u0000`, `a\u007f\u0000`},
		{"right-to-left marks", "a\u202eb\u2066c\u200fd\u061c", `a\u202eb\u2066c\u200fd\u061c`, `a\u202eb\u2066c\u200fd\u061c`},
		{"nothing to see", "a\u200bb\u00adc\ufeffd\u3164\ufe0f", `a\u200bb\u00adc\ufeffd\u3164\ufe0f`, `a\u200bb\u00adc\ufeffd\u3164\ufe0f`},
		{"tag characters", "a\U000e0041", `a\U000e0041`, `a\U000e0041`},
		{"marks piled up", "e\u0301\u0302\u0303\u0304", "e\u0301\u0302" + `\u0303\u0304`, `e\u0301\u0302\u0303\u0304`},
		{"letters of other scripts", "Müller 安全 🙂", "Müller 安全 🙂", `M\u00fcller \u5b89\u5168 \U0001f642`},
		{"of the trade", "100 kg ± 5 – m² ≥ ½ 30°", "100 kg ± 5 – m² ≥ ½ 30°", "100 kg +/- 5 - m2 >= 1/2 30 deg"},
		{"broken UTF-8", "a\xff", "a\ufffd", `a\ufffd`},
	} {
		if got := printable(c.in, false); got != c.out {
			t.Errorf("%s: %q, want %q", c.name, got, c.out)
		}
		if got := printable(c.in, true); got != c.ascii {
			t.Errorf("%s, ascii: %q, want %q", c.name, got, c.ascii)
		}
	}
}

func FuzzPrintable(f *testing.F) {
	f.Add("a\x1b[2J\u202e\U000e0001\u200d🙂")
	f.Fuzz(func(t *testing.T, s string) {
		for _, r := range printable(s, false) {
			if r != noBreakRune && !unicode.IsPrint(r) {
				t.Fatalf("%q lets %U through", s, r)
			}
		}
		out := printable(s, true)
		for _, r := range out {
			if r != noBreakRune && (r < ' ' || r > '~') {
				t.Fatalf("%q lets %U through in ASCII", s, r)
			}
		}
		if !utf8.ValidString(out) || strings.ContainsRune(out, '\n') {
			t.Fatalf("%q became %q", s, out)
		}
	})
}
