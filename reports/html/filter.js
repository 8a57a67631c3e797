"use strict";
(function () {
  const form = document.getElementById("filter");
  if (!form) return;
  const findings = Array.from(document.querySelectorAll(".finding"));
  const words = form.elements.words;
  const shown = document.getElementById("shown");
  const texts = findings.map(function (f) { return f.textContent.toLowerCase(); });
  function chosen(name) {
    return Array.from(form.querySelectorAll("input[name=" + name + "]:checked"), function (i) { return i.value; });
  }
  function apply() {
    const verdicts = chosen("verdict"), concerns = chosen("concern");
    const wanted = words.value.toLowerCase().split(/\s+/).filter(Boolean);
    let n = 0;
    findings.forEach(function (f, i) {
      const show = verdicts.includes(f.dataset.verdict) && concerns.includes(f.dataset.concern) &&
        wanted.every(function (w) { return texts[i].includes(w); });
      f.hidden = !show;
      if (show) n++;
    });
    shown.textContent = n + " of " + findings.length + " shown";
  }
  function reveal() {
    const target = document.getElementById(location.hash.slice(1));
    if (target && target.hidden) { form.reset(); apply(); target.scrollIntoView(); }
  }
  form.addEventListener("input", apply);
  form.addEventListener("reset", function () { setTimeout(apply, 0); });
  form.addEventListener("submit", function (e) { e.preventDefault(); });
  window.addEventListener("hashchange", reveal);
  window.addEventListener("beforeprint", function () { findings.forEach(function (f) { f.hidden = false; }); });
  window.addEventListener("afterprint", apply);
  form.hidden = false;
  apply();
})();
