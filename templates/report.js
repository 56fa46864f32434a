// Filter, sort, go to a cell, copy a question. The page is complete without any of it.
(() => {
  "use strict";
  const main = document.getElementById("main");
  const make = (tag, text, attributes = {}) => {
    const element = document.createElement(tag);
    if (text) element.textContent = text;
    for (const [name, value] of Object.entries(attributes)) element.setAttribute(name, value);
    return element;
  };
  const say = make("span", "", { role: "status", "aria-live": "polite" });

  // Filters: one check box for each verdict and level that occurs.
  const judged = [...main.querySelectorAll("[data-verdict], [data-level]")];
  const words = (element, name) => (element.dataset[name] || "").split("|").filter(Boolean);
  const boxes = { verdict: new Map(), level: new Map() };

  const apply = () => {
    let hidden = 0;
    for (const element of judged) {
      const shown = Object.entries(boxes).every(([name, choices]) => {
        const own = words(element, name);
        return own.length === 0 || own.some((word) => choices.get(word)?.checked);
      });
      element.classList.toggle("filtered", !shown);
      if (!shown) hidden += 1;
    }
    say.textContent = hidden ? `${hidden} entries are filtered out` : "";
  };

  const filterSet = (name, legend) => {
    const found = new Set(judged.flatMap((element) => words(element, name)));
    const set = make("fieldset");
    set.append(make("legend", legend));
    for (const word of found) {
      const label = make("label");
      const box = make("input", "", { type: "checkbox", value: word, name });
      box.checked = true;
      box.addEventListener("change", apply);
      boxes[name].set(word, box);
      label.append(box, ` ${word}`);
      set.append(label);
    }
    return found.size > 1 ? set : null;
  };

  // Go to a cell of the inputs as read.
  const goToCell = () => {
    const field = document.getElementById("go-to-cell");
    const wanted = field.value.trim().toUpperCase();
    if (!wanted) return;
    const rows = [...main.querySelectorAll("#inputs tr[id]")];
    const name = (row) => row.querySelector("th").textContent.trim().toUpperCase();
    const row = rows.find((r) => name(r) === wanted) || rows.find((r) => name(r).endsWith(`!${wanted}`));
    if (!row) {
      say.textContent = `no figure was read from ${field.value.trim()}`;
      return;
    }
    say.textContent = "";
    row.setAttribute("tabindex", "-1");
    location.hash = row.id;
    row.focus();
  };

  const cellSet = () => {
    const set = make("fieldset");
    set.append(make("legend", "Go to cell"));
    const field = make("input", "", { type: "text", id: "go-to-cell", "aria-label": "Cell address", size: "12" });
    field.addEventListener("keydown", (event) => { if (event.key === "Enter") goToCell(); });
    const button = make("button", "Go", { type: "button" });
    button.addEventListener("click", goToCell);
    set.append(field, button);
    return set;
  };

  const tools = make("div", "", { class: "tools", role: "group", "aria-label": "Filter and find" });
  const sets = [filterSet("verdict", "Verdict"), filterSet("level", "Level")].filter(Boolean);
  const more = main.querySelector("#inputs tr[id]") ? [cellSet()] : [];
  if (sets.length || more.length) {
    tools.append(...sets, ...more, say);
    main.prepend(tools);
  }

  // Sorting: numbers by size, everything else as text; a third click gives the first order back.
  const key = (row, column) => {
    const text = row.children[column]?.textContent.trim() ?? "";
    const number = text.replace(/[−–]/g, "-").replace(",", ".").match(/^[^\d+-]*([+-]?\d+(\.\d+)?)/);
    return number ? [0, Number(number[1]), text] : [1, 0, text];
  };
  const compare = (a, b) => a[0] - b[0] || a[1] - b[1] || a[2].localeCompare(b[2]);

  for (const table of main.querySelectorAll("table.sortable")) {
    const body = table.tBodies[0];
    const first = [...body.rows];
    [...table.tHead.rows[0].cells].forEach((head, column) => {
      const button = make("button", head.textContent.trim(), { type: "button" });
      head.replaceChildren(button);
      button.addEventListener("click", () => {
        const now = head.getAttribute("aria-sort");
        const next = now === "ascending" ? "descending" : now === "descending" ? "" : "ascending";
        for (const other of table.tHead.rows[0].cells) other.removeAttribute("aria-sort");
        const rows = [...first];
        if (next) {
          rows.sort((a, b) => compare(key(a, column), key(b, column)));
          if (next === "descending") rows.reverse();
          head.setAttribute("aria-sort", next);
        }
        body.append(...rows);
      });
    });
  }

  // Questions: copied as text; where the browser refuses, the text is selected instead.
  for (const question of main.querySelectorAll(".question")) {
    const asked = question.querySelector(".asked");
    const button = make("button", "Copy question", { type: "button" });
    button.setAttribute("aria-label", `Copy ${question.querySelector("h3").textContent.trim()}`);
    button.addEventListener("click", async () => {
      const text = asked.textContent.trim();
      try {
        await navigator.clipboard.writeText(text);
        button.textContent = "Copied";
      } catch {
        getSelection().selectAllChildren(asked);
        button.textContent = "Selected: copy with the keyboard";
      }
    });
    asked.after(button);
  }

  // Wide tables and figures scroll in their own frame, which the keyboard must reach.
  for (const frame of document.querySelectorAll(".wide, figure")) {
    if (frame.scrollWidth <= frame.clientWidth) continue;
    frame.setAttribute("tabindex", "0");
    frame.setAttribute("role", "group");
    const name = frame.querySelector("caption, summary, .figure-title");
    frame.setAttribute("aria-label", name ? name.textContent.trim() : frame.querySelector("table").getAttribute("aria-label"));
  }
})();
