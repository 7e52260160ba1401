package archive

import (
	"strings"
	"testing"
)

// Two files have two names in every form of a register, whatever bytes their
// names are made of, and an earlier register knows each again.
func TestFileNamesStayApart(t *testing.T) {
	names := []string{
		"jobs/a b.toml", "jobs/a\nb.toml", "jobs/a\tb.toml", "jobs/a\u00a0b.toml", "jobs/a\u2028b.toml", "jobs/a\rb.toml",
		"jobs/\xff.toml", "jobs/\xfe.toml", "jobs/\ufffd.toml", "jobs/\x1b[2J.toml", "jobs/\u202eb.toml", "jobs/ä.toml", "jobs/=1.toml", "=1.toml",
	}
	rows := make([]Row, len(names))
	seen := map[string]string{}
	for i, name := range names {
		rows[i] = rowOf(t, "settled.toml")
		rows[i].File = name
		shown := fileName(name)
		if other, twice := seen[shown]; twice {
			t.Errorf("%q and %q are both shown as %q", name, other, shown)
		}
		seen[shown] = name
		if strings.ContainsAny(shown, "\n\r\t\u2028") {
			t.Errorf("%q is shown as %q", name, shown)
		}
	}
	for _, layout := range []Layout{CSV, Lines} {
		earlier, err := ReadEarlier(strings.NewReader(register(t, layout, false, rows...)))
		if err != nil {
			t.Fatalf("form %d: %v", layout, err)
		}
		for i := range rows {
			row := rows[i]
			if earlier.Hold(&row, worseCode); row.Change != AsBefore {
				t.Errorf("form %d: %q is %s", layout, row.File, row.Change)
			}
		}
	}
}
