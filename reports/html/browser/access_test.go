package browser

import (
	"context"
	"fmt"
	"slices"
	"strings"
	"testing"

	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/chromedp"
	"github.com/chromedp/chromedp/kb"
)

// node is what the browser tells those who listen.
type node struct{ role, name string }

// told is the accessibility tree, flat and in order, without what is ignored.
func told(p *tab) []node {
	type value struct {
		Value any `json:"value"`
	}
	var tree struct {
		Nodes []struct {
			Ignored bool  `json:"ignored"`
			Role    value `json:"role"`
			Name    value `json:"name"`
		} `json:"nodes"`
	}
	p.do(chromedp.ActionFunc(func(ctx context.Context) error {
		return cdp.Execute(ctx, "Accessibility.getFullAXTree", nil, &tree)
	}))
	var all []node
	for _, n := range tree.Nodes {
		role, _ := n.Role.Value.(string)
		name, _ := n.Name.Value.(string)
		if !n.Ignored {
			all = append(all, node{role, name})
		}
	}
	return all
}

// Every control, region, picture and table that the browser announces has a name; there
// is one banner and one main part, and the parts of the page are announced as regions.
func TestWhatIsAnnounced(t *testing.T) {
	named := []string{"button", "link", "checkbox", "searchbox", "textbox", "region", "navigation", "image", "img", "article", "form", "heading", "group"}
	each(t, func(t *testing.T, p *tab) {
		count := map[string]int{}
		for _, n := range told(p) {
			count[n.role]++
			if slices.Contains(named, n.role) && n.name == "" {
				t.Errorf("a %s without a name", n.role)
			}
		}
		for role, want := range map[string]int{"banner": 1, "main": 1, "navigation": 1} {
			if count[role] != want {
				t.Errorf("%d times %s, want %d", count[role], role, want)
			}
		}
		if count["region"] < 2 || count["heading"] < 3 {
			t.Errorf("announced: %v", count)
		}
	})
}

// poor lists the texts whose contrast with what is behind them is less than WCAG 2.1 AA
// asks: 4.5 to 1, of large text 3 to 1. It is computed from what the browser shows.
const poor = `(() => {
  const parse = c => (c.match(/[\d.]+/g) || []).map(Number);
  const luminance = c => { const f = c.slice(0, 3).map(v => { v /= 255; return v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4; }); return 0.2126 * f[0] + 0.7152 * f[1] + 0.0722 * f[2]; };
  const behind = e => { for (; e; e = e.parentElement) { const c = parse(getComputedStyle(e).backgroundColor); if (c.length === 3 || c[3] === 1) return c; } return [255, 255, 255]; };
  const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
  const found = new Set();
  let seen = 0;
  for (let n = walker.nextNode(); n; n = walker.nextNode()) {
    const e = n.parentElement;
    if (!n.data.trim() || !e.checkVisibility() || e.closest("script, style, title, desc")) continue;
    seen++;
    const s = getComputedStyle(e);
    let ground = behind(e);
    const svg = e.closest("svg");
    let ink = parse(svg ? s.fill : s.color);
    if (svg && e.classList.contains("paper")) ground = parse(getComputedStyle(svg).color);
    const a = luminance(ink), b = luminance(ground);
    const ratio = (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
    const large = parseFloat(s.fontSize) >= 24 || (parseFloat(s.fontSize) >= 18.66 && parseInt(s.fontWeight) >= 700);
    if (!(ratio >= (large ? 3 : 4.5))) found.add(ratio.toFixed(2) + " " + e.tagName + "." + e.getAttribute("class") + " " + n.data.trim().slice(0, 30));
  }
  return [String(seen), ...found];
})()`

// Text stands out in the light, in the dark and on paper.
func TestContrastAsShown(t *testing.T) {
	for name, media := range map[string]*emulation.SetEmulatedMediaParams{
		"light": emulation.SetEmulatedMedia().WithFeatures([]*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: "light"}}),
		"dark":  emulation.SetEmulatedMedia().WithFeatures([]*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: "dark"}}),
		"print": emulation.SetEmulatedMedia().WithMedia("print"),
	} {
		each(t, func(t *testing.T, p *tab) {
			found := ask[[]string](p, poor)
			if len(found) > 1 {
				t.Errorf("%s: %q", name, found[1:])
			}
			if strings.HasSuffix(t.Name(), "failing") && len(found[0]) < 3 {
				t.Errorf("%s: only %s texts were seen", name, found[0])
			}
			ground := ask[string](p, `getComputedStyle(document.body).backgroundColor`)
			if dark := ground != "rgb(255, 255, 255)"; dark != (name == "dark") {
				t.Errorf("%s: the ground is %s", name, ground)
			}
		}, media)
	}
}

// The Tab key reaches everything that can be used, in the order in which it stands,
// begins with the way past the header, shows where it is, and leaves the page at its
// end.
func TestTabOrder(t *testing.T) {
	each(t, func(t *testing.T, p *tab) {
		const usable = `Array.from(document.querySelectorAll("a[href], button, input, summary, [tabindex='0']")).filter(e => e.checkVisibility())`
		n := int(ask[float64](p, usable+`.length`))
		p.do(chromedp.Evaluate(`window.stops = `+usable+`, null`, nil))
		first := min(n, 60)
		for i := range first {
			p.do(chromedp.KeyEvent(kb.Tab))
			if got := int(ask[float64](p, `stops.indexOf(document.activeElement)`)); got != i {
				t.Fatalf("stop %d is number %d: %s", i, got, ask[string](p, `document.activeElement.outerHTML.slice(0, 80)`))
			}
			if style := ask[string](p, `getComputedStyle(document.activeElement).outlineStyle`); style == "none" {
				t.Errorf("stop %d does not show", i)
			}
		}
		if text := ask[string](p, `stops[0].textContent`); !strings.HasPrefix(text, "Skip") {
			t.Errorf("the first stop is %q", text)
		}
		p.do(chromedp.Evaluate(`stops[stops.length - 1].focus()`, nil), chromedp.KeyEvent(kb.Tab))
		if ask[bool](p, `stops.slice(1).includes(document.activeElement)`) {
			t.Error("the page keeps the focus")
		}
	})
}

// On paper everything is there: nothing that was filtered away, no controls.
func TestPrint(t *testing.T) {
	p := open(t, browser(t), file(t, "failing", samples()["failing"]))
	p.do(chromedp.SendKeys(`input[name=words]`, "creepage"), chromedp.Evaluate(`window.dispatchEvent(new Event("beforeprint"))`, nil),
		emulation.SetEmulatedMedia().WithMedia("print"))
	shown := ask[[]float64](p, `["article.finding", "form, nav, .skip"].map(s => Array.from(document.querySelectorAll(s)).filter(e => e.checkVisibility()).length)`)
	if fmt.Sprint(shown) != "[5 0]" {
		t.Errorf("%v findings and controls", shown)
	}
}
