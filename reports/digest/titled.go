package digest

import "strings"

// Titled is the title of a curve or a table with its subject, where the title does not name
// that itself.
func Titled(title, subject string) string {
	if subject == "" || mentions(title, subject) {
		return title
	}
	return title + ", " + subject
}

// mentions reports whether a title has a subject in it as words of its own.
func mentions(title, subject string) bool {
	bare := strings.NewReplacer(":", "", ",", "", ";", "")
	return strings.Contains(" "+bare.Replace(title)+" ", " "+bare.Replace(subject)+" ")
}
