package main

import (
	"bytes"

	"github.com/spf13/cobra"

	"kilovet/hv/chain"
	"kilovet/hv/document"
)

func schemaCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:     "schema",
		Short:   "Write the JSON Schema of a description, for editors",
		Example: `  kilovet schema > chain.schema.json`,
		Args:    cobra.NoArgs,
		RunE:    func(*cobra.Command, []string) error { return w.schema() },
	}
}

func (w world) schema() error {
	var schema bytes.Buffer
	err := document.Schema(&schema, &chain.Chain{}, document.SchemaHead{
		ID:    "urn:kilovet:description:1",
		Title: "kilovet description",
		Means: "A high-voltage supply chain and its insulation, as kilovet reads it from TOML. What holds across keys is not said here: kilovet review says it.",
	})
	if err != nil {
		return err
	}
	return w.show(schema.Bytes())
}
