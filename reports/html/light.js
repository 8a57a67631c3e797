"use strict";
(function () {
  const drawing = document.querySelector("#schematic svg");
  if (!drawing) return;
  const parts = Array.from(drawing.querySelectorAll("g[data-of]"));
  function shows(part, subject) {
    const name = part.dataset.of;
    return subject !== "" && (name === subject || name.startsWith(subject + "."));
  }
  function light(subject) {
    parts.forEach(function (p) { p.classList.toggle("lit", shows(p, subject)); });
  }
  function about(event) {
    const teller = event.target.closest("article[data-of], li[data-of]");
    if (teller) light(teller.dataset.of);
  }
  document.addEventListener("focusin", about);
  document.addEventListener("pointerover", about);
  drawing.classList.add("reached");
  drawing.addEventListener("click", function (event) {
    const part = event.target.closest("g[data-of]");
    if (!part) return;
    const found = Array.from(document.querySelectorAll(".finding")).find(function (f) { return shows(part, f.dataset.of); });
    if (!found) return;
    location.hash = found.id;
    found.querySelector("a").focus();
  });
  function follow() {
    const found = document.getElementById(location.hash.slice(1));
    if (found && found.dataset.of !== undefined) light(found.dataset.of);
  }
  window.addEventListener("hashchange", follow);
  follow();
})();
