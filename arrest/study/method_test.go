package study

import (
	"testing"

	"arrestcheck/arrest"
)

func TestMethodsAreWholeAndNew(t *testing.T) {
	for i, m := range Methods() {
		if m.ID == "" || m.Title == "" || m.Valid == "" || m.Errs == "" || m.Source == "" {
			t.Errorf("%+v", m)
		}
		if _, twice := arrest.MethodByID(m.ID); twice {
			t.Errorf("%s stands in two lists", m.ID)
		}
		if i > 0 && m.ID <= Methods()[i-1].ID {
			t.Errorf("%s is out of order", m.ID)
		}
	}
}
