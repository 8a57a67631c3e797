package browser

import (
	"context"
	"fmt"
	"net/url"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/log"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"

	"kilovet/reports/html"
	"kilovet/reports/internal/sample"
	"kilovet/rules"
)

// samples are the pages that are opened.
func samples() map[string]*rules.Review {
	failing := sample.Failing()
	failing.Diagram, failing.Curves, failing.Tables = sample.Diagram(6), sample.Curves()[:3], sample.Tables()[:1]
	return map[string]*rules.Review{"failing": failing, "hard": sample.Hard(), "empty": sample.Empty()}
}

// tab is a page in the browser with what it did beside showing itself.
type tab struct {
	context.Context
	t    *testing.T
	lock sync.Mutex
	said []string // to the console or the log
	read []string // addresses
}

// chromium is one browser for all tests.
var chromium struct {
	sync.Once
	context.Context
	err error
}

// TestMain closes the browser.
func TestMain(m *testing.M) {
	ctx, stop := context.WithCancel(context.Background())
	chromium.Context = ctx
	status := m.Run()
	stop()
	os.Exit(status)
}

// browser starts it; where there is none the test is skipped, CI has it.
func browser(t *testing.T) context.Context {
	t.Helper()
	found := ""
	for _, name := range []string{"chromium", "chromium-browser", "google-chrome"} {
		if path, err := exec.LookPath(name); err == nil {
			found = path
			break
		}
	}
	if found == "" {
		t.Skip("no Chromium")
	}
	chromium.Do(func() {
		options := append(slices.Clone(chromedp.DefaultExecAllocatorOptions[:]), chromedp.ExecPath(found), chromedp.NoSandbox, chromedp.WindowSize(1280, 900))
		allocator, _ := chromedp.NewExecAllocator(chromium.Context, options...)
		chromium.Context, _ = chromedp.NewContext(allocator)
		chromium.err = chromedp.Run(chromium.Context)
	})
	if chromium.err != nil {
		t.Fatal(chromium.err)
	}
	return chromium.Context
}

// open shows an address in a new tab.
func open(t *testing.T, browser context.Context, address string, before ...chromedp.Action) *tab {
	t.Helper()
	ctx, cancel := chromedp.NewContext(browser) // a tab of its own
	t.Cleanup(cancel)
	ctx, stop := context.WithTimeout(ctx, 2*time.Minute)
	t.Cleanup(stop)
	page := &tab{Context: ctx, t: t}
	chromedp.ListenTarget(ctx, page.note)
	page.do(append([]chromedp.Action{network.Enable(), log.Enable(), runtime.Enable()}, before...)...)
	page.do(chromedp.Navigate(address))
	return page
}

func (p *tab) note(event any) {
	p.lock.Lock()
	defer p.lock.Unlock()
	switch e := event.(type) {
	case *runtime.EventConsoleAPICalled:
		p.said = append(p.said, fmt.Sprintf("console %s %v", e.Type, e.Args))
	case *runtime.EventExceptionThrown:
		p.said = append(p.said, e.ExceptionDetails.Error())
	case *log.EventEntryAdded:
		p.said = append(p.said, e.Entry.Text)
	case *network.EventRequestWillBeSent:
		p.read = append(p.read, e.Request.URL)
	}
}

func (p *tab) do(actions ...chromedp.Action) {
	p.t.Helper()
	if err := chromedp.Run(p, actions...); err != nil {
		p.t.Fatal(err)
	}
}

// ask evaluates a script in the page.
func ask[T any](p *tab, script string) T {
	p.t.Helper()
	var answer T
	p.do(chromedp.Evaluate(script, &answer))
	return answer
}

// file writes a page where the browser can open it.
func file(t *testing.T, name string, r *rules.Review) string {
	t.Helper()
	data, err := html.Render(r)
	if err != nil {
		t.Fatal(err)
	}
	path := filepath.Join(t.TempDir(), name+".html")
	if err := os.WriteFile(path, data, 0o644); err != nil {
		t.Fatal(err)
	}
	return (&url.URL{Scheme: "file", Path: path}).String()
}

// each opens every sample.
func each(t *testing.T, check func(t *testing.T, p *tab), before ...chromedp.Action) {
	b := browser(t)
	for name, r := range samples() {
		t.Run(name, func(t *testing.T) { check(t, open(t, b, file(t, name, r), before...)) })
	}
}

// The page loads nothing but itself and says nothing to the console or the log, also
// while it is used.
func TestNothingIsLoadedAndNothingLogged(t *testing.T) {
	each(t, func(t *testing.T, p *tab) {
		p.do(chromedp.Evaluate(`document.querySelectorAll("a, input, button, summary").forEach(e => { e.focus(); if (e.type === "checkbox") e.click(); })`, nil))
		p.do(chromedp.Evaluate(`document.querySelectorAll("svg g").forEach(g => g.dispatchEvent(new MouseEvent("click", {bubbles: true})))`, nil))
		p.do(chromedp.Sleep(200 * time.Millisecond))
		p.lock.Lock()
		defer p.lock.Unlock()
		if len(p.said) > 0 {
			t.Errorf("said %q", p.said)
		}
		if len(p.read) != 1 {
			t.Errorf("read %q", p.read)
		}
	})
}

// Nothing is wider than the window, down to 320 points across (WCAG 2.1, 1.4.10);
// what is wide scrolls in a region of its own.
func TestNothingIsWiderThanTheWindow(t *testing.T) {
	for _, width := range []int64{320, 800, 1280, 1920} {
		each(t, func(t *testing.T, p *tab) {
			if over := ask[float64](p, `document.scrollingElement.scrollWidth - document.documentElement.clientWidth`); over > 0 {
				t.Errorf("%d: %g too wide: %q", width, over, ask[[]string](p, wide))
			}
		}, emulation.SetDeviceMetricsOverride(width, 900, 1, false))
	}
}

// wide lists what reaches out of the window and does not scroll.
const wide = `Array.from(document.querySelectorAll("body *")).filter(e => e.getBoundingClientRect().right > innerWidth + 1 && !e.closest(".wide, svg")).slice(0, 5).map(e => e.tagName + "." + e.className + " " + e.textContent.slice(0, 40))`

// The filter hides findings by verdict, concern and word, says how many are left, and
// shows all again.
func TestFilter(t *testing.T) {
	p := open(t, browser(t), file(t, "failing", samples()["failing"]))
	left := func() float64 {
		return ask[float64](p, `document.querySelectorAll(".finding:not([hidden])").length`)
	}
	all := left()
	p.do(chromedp.Click(`input[name=verdict][value=meets]`))
	if got := left(); got != all-2 || !strings.HasPrefix(ask[string](p, `document.getElementById("shown").textContent`), fmt.Sprintf("%g of %g", all-2, all)) {
		t.Errorf("%g of %g left without what is met", got, all)
	}
	p.do(chromedp.SendKeys(`input[name=words]`, "creepage"))
	if got := left(); got != 1 {
		t.Errorf("%g hold the word", got)
	}
	p.do(chromedp.Click(`button[type=reset]`), chromedp.Sleep(50*time.Millisecond))
	if got := left(); got != all {
		t.Errorf("%g of %g after showing all again", got, all)
	}
}

// A link to a finding that is hidden shows it.
func TestALinkShowsAHiddenFinding(t *testing.T) {
	p := open(t, browser(t), file(t, "failing", samples()["failing"]))
	p.do(chromedp.SendKeys(`input[name=words]`, "nothing holds this"),
		chromedp.Evaluate(`document.querySelector(".entries a").click()`, nil), chromedp.Sleep(100*time.Millisecond))
	if !ask[bool](p, `!document.querySelector(location.hash).hidden`) {
		t.Error("the finding stays hidden")
	}
}

// Focusing a finding lights up its part in the schematic, and nothing else; a click on
// the part leads to the finding.
func TestAFindingLightsUpItsPart(t *testing.T) {
	p := open(t, browser(t), file(t, "failing", samples()["failing"]))
	lit := `Array.from(new Set(Array.from(document.querySelectorAll("#schematic g.lit"), g => g.dataset.of)))`
	if got := ask[[]string](p, lit); len(got) != 0 {
		t.Errorf("lit from the start: %q", got)
	}
	p.do(chromedp.Focus(`.finding[data-of=cable] h3 a`))
	if got := ask[[]string](p, lit); !slices.Equal(got, []string{"cable"}) {
		t.Errorf("lit: %q", got)
	}
	before := ask[string](p, `getComputedStyle(document.querySelector('#schematic g[data-of="drive.source"] path')).strokeWidth`)
	if after := ask[string](p, `getComputedStyle(document.querySelector("#schematic g.lit path")).strokeWidth`); after == before {
		t.Errorf("what is lit has lines of %s as the rest", after)
	}
	p.do(chromedp.Evaluate(`document.activeElement.blur(); document.querySelector('#schematic g[data-of=cable] path').dispatchEvent(new MouseEvent("click", {bubbles: true}))`, nil))
	if !ask[bool](p, `document.activeElement.closest(".finding").dataset.of === "cable"`) {
		t.Error("the part does not lead to its finding")
	}
}
