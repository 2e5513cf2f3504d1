"use strict";
for (const figure of document.querySelectorAll("figure")) {
  const spots = [...figure.querySelectorAll(".spot")];
  const readout = figure.querySelector(".readout");
  if (!readout || spots.length === 0) continue;
  const enter = (k) => {
    for (const s of spots) s.setAttribute("tabindex", "-1");
    spots[k].setAttribute("tabindex", "0");
  };
  const tell = (k) => { readout.textContent = spots[k].dataset.words; };
  enter(0);
  spots.forEach((s, k) => {
    s.addEventListener("mouseenter", () => tell(k));
    s.addEventListener("focus", () => { enter(k); tell(k); });
    s.addEventListener("keydown", (e) => {
      const last = spots.length - 1;
      const to = { ArrowRight: k + 1, ArrowDown: k + 1, ArrowLeft: k - 1, ArrowUp: k - 1, Home: 0, End: last }[e.key];
      if (to === undefined) return;
      e.preventDefault();
      spots[Math.min(last, Math.max(0, to))].focus();
    });
  });
}
let opened = [];
addEventListener("beforeprint", () => {
  opened = [...document.querySelectorAll("details:not([open])")];
  for (const d of opened) d.open = true;
});
addEventListener("afterprint", () => {
  for (const d of opened) d.open = false;
});
