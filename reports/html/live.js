"use strict";
(function () {
  const known = document.querySelector("meta[name=version]").content;
  const changes = new EventSource("changes");
  changes.onmessage = function (e) { if (e.data !== known) location.reload(); };
})();
