package main

import (
	"bytes"

	"github.com/spf13/cobra"

	"kilovet/hv/chain"
)

func draftCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:     "draft",
		Short:   "Write a description to fill in, with every key explained",
		Example: `  kilovet draft > chain.toml`,
		Args:    cobra.NoArgs,
		RunE:    func(*cobra.Command, []string) error { return w.draft() },
	}
}

func (w world) draft() error {
	var draft bytes.Buffer
	if err := chain.Draft(&draft); err != nil {
		return err
	}
	return w.show(draft.Bytes())
}
