package main

import (
	"bytes"

	"github.com/spf13/cobra"

	"kilovet/hv/document"
)

// shells are those that completion is written for.
var shells = []string{"bash", "fish", "powershell", "zsh"}

func completionCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:   "completion SHELL",
		Short: "Write what lets a shell complete commands, flags and rules",
		Long:  "Write what lets a shell complete commands, flags, their words and the names of\nrules: for bash, fish, powershell or zsh.",
		Example: `  kilovet completion bash > ~/.local/share/bash-completion/completions/kilovet
  kilovet completion zsh > "${fpath[1]}/_kilovet"
  kilovet completion fish > ~/.config/fish/completions/kilovet.fish
  kilovet completion powershell | Out-String | Invoke-Expression`,
		Args:      cobra.ExactArgs(1),
		ValidArgs: shells,
		RunE:      func(c *cobra.Command, args []string) error { return w.completion(c.Root(), args[0]) },
	}
}

// completion writes the script of a shell.
func (w world) completion(root *cobra.Command, shell string) error {
	writers := map[string]func(*bytes.Buffer) error{
		"bash":       func(b *bytes.Buffer) error { return root.GenBashCompletionV2(b, true) },
		"fish":       func(b *bytes.Buffer) error { return root.GenFishCompletion(b, true) },
		"powershell": func(b *bytes.Buffer) error { return root.GenPowerShellCompletionWithDesc(b) },
		"zsh":        func(b *bytes.Buffer) error { return root.GenZshCompletion(b) },
	}
	write, known := writers[shell]
	if !known {
		if near, ok := document.Nearest(shell, shells); ok {
			return exitf(unusable, "no completion for %q; did you mean %s?", shell, near)
		}
		return exitf(unusable, "no completion for %q; there is one for bash, fish, powershell and zsh", shell)
	}
	var script bytes.Buffer
	if err := write(&script); err != nil {
		return err
	}
	return w.show(script.Bytes())
}
