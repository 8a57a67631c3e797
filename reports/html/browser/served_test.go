package browser

import (
	"bufio"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/chromedp/chromedp"
)

// served runs `kilovet show` on a description and gives the address that it says.
func served(t *testing.T, description string) string {
	t.Helper()
	program := filepath.Join(t.TempDir(), "kilovet")
	build := exec.Command("go", "build", "-o", program, "./cmd/kilovet")
	build.Dir = "../../.."
	build.Env = append(os.Environ(), "GOFLAGS=-buildvcs=false")
	if out, err := build.CombinedOutput(); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	show := exec.Command(program, "show", description)
	out, err := show.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := show.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		show.Process.Kill()
		show.Wait()
	})
	line, err := bufio.NewReader(out).ReadString('\n')
	if err != nil {
		t.Fatal(err)
	}
	address, _, _ := strings.Cut(line, " ")
	return address
}

// The served page follows the file: what is saved is shown without being asked for, the
// faults of a description at their lines, and it logs nothing meanwhile.
func TestServedPageFollowsTheFile(t *testing.T) {
	b := browser(t)
	path := filepath.Join(t.TempDir(), "gap.toml")
	save := func(text string) {
		if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	const gap = `format = 1
title = "First"
[site]
altitude = "200 m"
pollution_degree = 2
[[spacing]]
name = "gap"
voltage = "5 kV"
medium = "air"
clearance = "30 mm"
`
	save(gap)
	p := open(t, b, served(t, path))
	p.until("the first title", `document.querySelector("h1").textContent === "First"`)
	save(strings.Replace(gap, "First", "Second", 1))
	p.until("the second title", `document.querySelector("h1").textContent === "Second"`)
	save(strings.Replace(gap, `"5 kV"`, `"5 kg"`, 1))
	p.until("the fault at its line", `!!document.querySelector("#line-8.bad .fault")`)
	save(gap)
	p.until("the first title again", `document.querySelector("h1").textContent === "First"`)
	p.lock.Lock()
	defer p.lock.Unlock()
	if len(p.said) > 0 {
		t.Errorf("said %q", p.said)
	}
}

// until waits for something to be true of the page.
func (p *tab) until(what, script string) {
	p.t.Helper()
	for range 600 {
		var there bool // while the page is loaded anew there is nothing to ask
		if err := chromedp.Run(p, chromedp.Evaluate(script, &there)); err == nil && there {
			return
		}
		time.Sleep(100 * time.Millisecond)
	}
	p.t.Fatalf("%s did not come", what)
}
