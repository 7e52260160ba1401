package reportgen

// A subject is what a sheet is about. It decides which words are used: where
// no person is part of the job, no sentence speaks of one.
type subject uint8

const (
	aPerson subject = iota
	aTool           // falls, and no person with it
	aLoad           // moves and is stopped
	subjects
)

// subjectIDs are the subjects in JSON.
var subjectIDs = texts{"person", "tool", "moving_load"}

func (s *Sheet) subject() subject {
	switch {
	case s.File.Job.Moving():
		return aLoad
	case s.Result.Persons == 0:
		return aTool
	}
	return aPerson
}

// texts holds a text for each subject.
type texts [subjects]string

// lists holds a list of texts for each subject.
type lists [subjects][]string

// about returns the statement as it reads on a sheet about this subject.
func (sub subject) about(st statement) statement {
	if other, ok := withoutPersons[st.number]; ok && sub != aPerson {
		return other
	}
	return st
}
