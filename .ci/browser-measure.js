// Measures the page it stands in and sends what it finds to the window that holds the
// page: where it was shown (the part after #), then "good; …" or a list of faults.
(() => {
  const faults = [];
  const say = s => { if (faults.length < 12) faults.push(s); };
  addEventListener("error", e => say("error: " + (e.message || "a resource does not load")), true);
  for (const kind of ["log", "info", "warn", "error"]) {
    console[kind] = (...a) => say("console." + kind + ": " + a.join(" "));
  }

  // Boxes of visible text: one for each line of HTML text, one for each SVG label.
  function boxes() {
    const list = [];
    for (const t of document.querySelectorAll("svg text")) {
      const r = t.getBoundingClientRect();
      if (r.width && r.height) list.push({ r, s: t.textContent, owner: t, svg: true });
    }
    const walk = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
    while (walk.nextNode()) {
      const n = walk.currentNode, p = n.parentElement;
      if (!n.data.trim() || p.closest("svg, script, style, .skip, thead")) continue;
      const range = document.createRange();
      range.selectNodeContents(n);
      for (const r of range.getClientRects()) {
        if (r.width > 1 && r.height > 1) list.push({ r, s: n.data.trim(), owner: n });
      }
    }
    return list;
  }

  function overlaps(list) {
    // What a line box claims above and below its letters does not count.
    const b = list.map(x => {
      const v = x.r.height * 0.22, h = x.svg ? x.r.width * 0.04 : 0.5;
      return { l: x.r.left + h, r: x.r.right - h, t: x.r.top + v, b: x.r.bottom - v, x };
    }).sort((p, q) => p.t - q.t);
    for (let i = 0; i < b.length; i++) {
      for (let k = i + 1; k < b.length && b[k].t < b[i].b; k++) {
        if (b[i].x.owner === b[k].x.owner) continue;
        if (Math.min(b[i].r, b[k].r) - Math.max(b[i].l, b[k].l) > 1 &&
            Math.min(b[i].b, b[k].b) - Math.max(b[i].t, b[k].t) > 1) {
          say("text on text: “" + b[i].x.s.slice(0, 24) + "” and “" + b[k].x.s.slice(0, 24) + "”");
        }
      }
    }
  }

  addEventListener("load", () => setTimeout(() => {
    const where = location.hash.slice(1);
    for (const d of document.querySelectorAll("details")) d.open = where !== "paper";
    const root = document.scrollingElement, width = document.documentElement.clientWidth;
    if (root.scrollWidth > width + 1) {
      say("scrolls sideways: " + root.scrollWidth + " px in " + width);
      for (const e of document.querySelectorAll("body *")) {
        const r = e.getBoundingClientRect();
        if (r.right > width + 1 && r.width) { say("too wide: " + e.tagName + "." + (e.getAttribute("class") || "")); break; }
      }
    }
    const loaded = performance.getEntriesByType("resource");
    if (loaded.length) say("loads " + loaded[0].name);
    const text = boxes();
    overlaps(text);
    let fit = 0, steps = 0;
    for (const s of document.querySelectorAll(".step")) {
      steps++;
      if (s.getBoundingClientRect().height <= 1017) fit++;
    }
    const answer = faults.length ? faults.join("; ")
      : "good; " + text.length + " pieces of text, " + document.querySelectorAll("svg").length + " drawings, " +
        width + " px wide" + (steps ? ", " + fit + " of " + steps + " steps no taller than a page" : "");
    parent.postMessage(where + ": " + answer, "*");
  }, 100));
})();
