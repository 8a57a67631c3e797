package main

import (
	"bytes"
	"fmt"
	"slices"
	"strings"

	"kilovet/reports/seal"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// requiredSets are the concerns that a sheet can require: life always.
var requiredSets = [][]rule.Concern{
	rule.Concerns,
	{rule.Life, rule.Equipment},
	{rule.Life, rule.Performance},
	{rule.Life},
}

// byCode holds a code against the codes of a review.
func byCode(b *text.Belongs, given *signable) {
	for _, set := range requiredSets {
		if given.review.Code(set) != b.Code {
			continue
		}
		b.Required = strings.Join(words(set), ", ")
		if !rules.SignOffOf(given.chain, given.review, set, given.read).Issued() {
			b.Against = append(b.Against, "no sheet is issued for this description: kilovet signoff says why")
		}
		return
	}
	b.Against = append(b.Against, "it is the code of other files, another version of the program, or other verdicts; where local limits or readings were used, name them too")
}

// bySheet holds a stamp against a review and, where they agree, the sheet against the
// one that is made from it.
func bySheet(b *text.Belongs, stamp seal.Stamp, sheet []byte, given *signable) error {
	review := given.review
	b.Required = strings.Join(words(stamp.Required), ", ")
	b.Against = otherInputs(stamp.Inputs, review.Inputs)
	if v := review.Program.Version; v != stamp.Version {
		b.Against = append(b.Against, fmt.Sprintf("program: the sheet was made by version %s, and this is %s", stamp.Version, v))
	}
	signed := rules.SignOffOf(given.chain, review, stamp.Required, given.read)
	switch {
	case len(b.Against) > 0:
		return nil
	case !signed.Issued():
		b.Against = append(b.Against, "no sheet is issued for this description: kilovet signoff says why")
		return nil
	case signed.Code != stamp.Code:
		b.Against = append(b.Against, "verdicts: those of these files are not those of the sheet, whose code is "+stamp.Code)
		return nil
	}
	review.Inputs = stamp.Inputs // the same files; a file may have got another name since
	again, err := sheetOf(review, signed, stamp)
	if err != nil {
		return err
	}
	if !bytes.Equal(again, sheet) {
		b.Against = append(b.Against, "pages: the sheet made anew from these files is another one; it was changed on purpose, or made by another build of this version")
	}
	return nil
}

// otherInputs says which of the files read are not those of the sheet.
func otherInputs(of, are []rules.Input) []string {
	var against []string
	in := func(list []rules.Input, role string) int {
		return slices.IndexFunc(list, func(i rules.Input) bool { return i.Role == role })
	}
	for _, was := range of {
		switch i := in(are, was.Role); {
		case i < 0:
			against = append(against, fmt.Sprintf("%s: the sheet was made with %s, and none is named here", was.Role, was.Name))
		case are[i].SHA256 != was.SHA256:
			against = append(against, fmt.Sprintf("%s: %s has SHA-256 %s; the sheet is for %s with %s", was.Role, are[i].Name, are[i].SHA256, was.Name, was.SHA256))
		}
	}
	for _, is := range are {
		if in(of, is.Role) < 0 {
			against = append(against, fmt.Sprintf("%s: the sheet was made without %s", is.Role, is.Name))
		}
	}
	return against
}
