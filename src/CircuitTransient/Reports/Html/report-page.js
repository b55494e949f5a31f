// The page: what is switched and scaled, and everything that follows from it.
const explorer = document.getElementById("explorer");
const make = (name, attributes = {}, ...children) => {
  const element = document.createElement(name);
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, value);
  element.append(...children);
  return element;
};
const state = { on: data.causes.map(() => true), scale: data.causes.map(() => 1), lines: "largest" };
const scalesNow = () => state.on.map((on, c) => (on ? state.scale[c] : 0));

const shared = {
  axis: { origin: 0, log: false },
  whole() {
    if (!this.axis.log) return { from: 0, to: data.until };
    const later = allTimes[firstAt(allTimes, this.axis.origin + 1e-12 * data.until)];
    return { from: Math.min(later, data.until / 2), to: data.until };
  },
  zoom(window) {
    this.window = window ?? this.whole();
    this.draw();
  },
  draw() { drawAll(); },
};
shared.window = shared.whole();

const views = data.observations.map((observation, index) => {
  const host = document.querySelector(`.plots[data-observation="${index}"]`);
  const section = host.closest(".observation");
  const view = { observation, host, section, panels: [], isNear: false, isDirty: true };
  host.append(tools(view));
  // An observation with a window of its own is shown within it; the others share their time axis.
  const { from, to } = observation;
  const window = from > 0 || to < data.until ? { from, to, origin: 0, log: false, words: "its window" } : undefined;
  view.panels.push(new Panel(host, view, window, shared));
  if (observation.closeUp) {
    const words = make("p", { class: "aside close-up" }, `Close-up: ${observation.closeUp.words}`);
    host.append(words);
    view.panels.push(new Panel(host, view, { ...observation.closeUp, log: false }, shared));
  }
  return view;
});

function tools(view) {
  const main = () => view.panels[0];
  const button = (words, action) => {
    const element = make("button", { type: "button" }, words);
    element.addEventListener("click", action);
    return element;
  };
  const go = (side) => () => main().show(view.model.extremes[side].time);
  const near = (share) => () => main().press(new KeyboardEvent("keydown", { key: share }));
  const row = make("div", { class: "tools" },
    button("Highest", go("max")), button("Lowest", go("min")), button("Closer", near("+")), button("Wider", near("-")),
    button("Whole study", () => main().whole()));
  const { others } = waves[view.observation.wave];
  if (others.length > 0) {
    const list = make("select", { class: "counted", "aria-label": "How its contributions are counted" },
      make("option", { value: "" }, "Causes from the start"),
      ...others.map((o) => make("option", { value: o.breakdown }, `Causes ${data.breakdowns[o.breakdown].words.slice(0, 80)}`)));
    list.addEventListener("change", () => {
      view.breakdown = list.value === "" ? undefined : Number(list.value);
      drawView(view);
    });
    row.append(list);
  }
  if (data.events.length > 0) {
    const options = data.events.map((e, i) =>
      make("option", { value: i }, `${e.name.slice(0, 60)}, ${engineering(e.time, "s")}`));
    const list = make("select", { "aria-label": "Go to an event" }, make("option", { value: "" }, "Go to event…"), ...options);
    list.addEventListener("change", () => {
      if (list.value !== "") main().show(data.events[Number(list.value)].time);
      list.value = "";
    });
    row.append(list);
  }
  return row;
}

// What a panel shows with the causes as they stand.
function modelOf(view, scales) {
  const { observation } = view;
  const wave = waves[observation.wave];
  const total = sumOf(wave, scales);
  const solved = isSolved(scales) ? total : view.solved ?? (view.solved = sumOf(wave, solvedScales));
  const other = wave.others.find((o) => o.breakdown === view.breakdown);
  const parts = other ? partsBy(other, scales) : partsOf(wave, scales);
  const names = other ? other.terms.map((t) => t.name) : wave.quadratic ? [...data.causes, "joint"] : data.causes;
  const peak = (values) => values.reduce((most, v) => (Math.abs(v) > most ? Math.abs(v) : most), 0);
  const span = peak(total) || peak(solved);
  const extremes = extremesOf(observation, scales, total);
  const table = view.section.querySelector("table.causes:not(.since)");
  const side = table?.dataset.at ?? "max";
  // Pulses of a train are alike: what they are at the extreme ranks them.
  const rank = (line) => (other ? Math.abs(valueAt(wave.times, line.values, extremes[side].time)) || 0 : line.peak);
  const ranked = parts.map((values, c) => ({ values, name: names[c], style: `c${c % 6}`, peak: peak(values) }))
    .filter((line) => line.peak > (state.lines === "all" ? 0 : 0.005 * span))
    .sort((a, b) => rank(b) - rank(a) || b.peak - a.peak);
  const drawn = parts.length < 2 || state.lines === "none" ? [] : state.lines === "all" ? ranked : ranked.slice(0, 6);
  const lines = other ? drawn.map((line, i) => ({ ...line, style: `c${i % 6}` })) : drawn;
  return { ...observation, times: wave.times, total, solved, parts, names, lines, extremes, side };
}

function drawView(view) {
  const scales = scalesNow();
  view.model = modelOf(view, scales);
  const width = view.host.clientWidth - 2;
  for (const panel of view.panels) panel.draw(view.model, state.printWidth ?? width);
  followTable(view, scales);
  followExtremes(view, scales);
  view.isDirty = false;
}

function drawAll() {
  for (const view of views) {
    view.isDirty = true;
    if (view.isNear || state.printWidth) drawView(view);
  }
}

// Keeps what the tool wrote, so that it comes back unchanged.
const written = new Map();
function rewrite(element, ...content) {
  if (!element) return;
  if (!written.has(element)) written.set(element, [...element.childNodes]);
  element.replaceChildren(...content);
}
function restore(element) {
  if (written.has(element)) element.replaceChildren(...written.get(element));
}

function followTable(view, scales) {
  const table = view.section.querySelector("table.causes:not(.since)");
  if (!table) return;
  const isOther = view.breakdown !== undefined;
  const caption = view.section.querySelector("figcaption");
  if (isOther) {
    rewrite(caption, `The thick line is the total; thin lines are contributions ${data.breakdowns[view.breakdown].words}, the six largest at its ${sideWord(view)} value.`);
  } else {
    restore(caption);
  }
  view.section.querySelectorAll(".since, .cancelling, .breakdown").forEach((e) => { e.hidden = isOther || !isSolved(scales); });
  view.section.querySelectorAll(".words").forEach((e) => { e.hidden = !isSolved(scales); });
  table.parentElement.hidden = isOther;
  view.other?.remove();
  if (isOther) {
    view.other = otherTable(view);
    table.parentElement.after(view.other);
    return;
  }
  const cells = [...table.querySelectorAll("[data-cause] td, .peak")];
  if (isSolved(scales)) {
    cells.forEach(restore);
    return;
  }
  const { unit, side, extremes, parts, times } = view.model;
  const wave = waves[view.observation.wave];
  const sign = side === "max" ? 1 : -1;
  const { value: total, time, index } = extremes[side];
  const then = parts.map((values) => (times[index] === time ? values[index] : valueAt(times, values, time)));
  const largest = Math.max(...then.map(Math.abs), 1e-300);
  rewrite(table.querySelector(".peak"), `${engineering(total, unit)} at ${engineering(time, "s")}, as scaled`);
  for (const row of table.querySelectorAll("[data-cause]")) {
    const c = Number(row.dataset.cause);
    const cell = (name) => row.querySelector(`.${name}`);
    const { from, to } = view.observation;
    const high = extremeOf(times, parts[c], from, to, 1);
    const low = extremeOf(times, parts[c], from, to, -1);
    const own = Math.abs(low.value) > Math.abs(high.value) ? low : high;
    const isCause = c < data.causes.length;
    rewrite(cell("then"), signed(then[c], unit));
    rewrite(cell("share"), total !== 0 ? percent(then[c] / total) : "");
    rewrite(cell("bars"), barOf(then[c], largest));
    rewrite(cell("own"), `${engineering(own.value, unit)} at ${engineering(own.time, "s")}`);
    const without = isCause && (wave.quadratic
      ? sumOf(wave, scales.map((s, i) => (i === c ? 0 : s)))
      : view.model.total.map((sum, i) => sum - parts[c][i]));
    rewrite(cell("without"), without ? engineering(extremeOf(times, without, from, to, sign).value, unit) : "");
  }
}

const sideWord = (view) => (view.model.side === "max" ? "highest" : "lowest");

// What made the extreme by the breakdown that was chosen, as scaled.
function otherTable(view) {
  const { unit, side, extremes, parts, names, times, total, to } = view.model;
  const { words, from: since } = data.breakdowns[view.breakdown];
  const from = Math.max(view.model.from, since);
  const isEarlier = extremes[side].time < since;
  const { value, time, index } = isEarlier ? extremeOf(times, total, from, to, side === "max" ? 1 : -1) : extremes[side];
  const word = side === "max" ? "highest" : "lowest";
  const then = parts.map((values) => (times[index] === time ? values[index] : valueAt(times, values, time)));
  const largest = Math.max(...then.map(Math.abs), 1e-300);
  const number = (...content) => make("td", { class: "number" }, ...content);
  const rows = names.map((name, c) => c).sort((a, b) => Math.abs(then[b]) - Math.abs(then[a])).map((c) => {
    const [high, low] = [1, -1].map((sign) => extremeOf(times, parts[c], from, to, sign));
    const own = Math.abs(low.value) > Math.abs(high.value) ? low : high;
    const without = extremeOf(times, total.map((sum, i) => sum - parts[c][i]), from, to, side === "max" ? 1 : -1);
    const bars = make("td", { class: "bars" });
    bars.append(barOf(then[c], largest));
    return make("tr", {}, make("th", { scope: "row" }, make("bdi", {}, names[c])), number(signed(then[c], unit)),
      number(value !== 0 ? percent(then[c] / value) : ""), bars,
      number(engineering(own.value, unit), make("span", { class: "aside" }, own.value === 0 ? "" : ` at ${engineering(own.time, "s")}`)),
      number(engineering(without.value, unit)));
  });
  const heads = [["Cause"], ["Then", "number"], ["Of the total", "number"], ["", ""], ["Its own peak", "number"],
    [side === "max" ? "Highest without it" : "Lowest without it", "number"]];
  const head = make("tr", {}, ...heads.map(([text, style]) => make("th", { scope: "col", class: style ?? "" },
    text === "" ? make("span", { class: "hidden" }, "Bar") : text)));
  return make("div", { class: "wide other" }, make("table", { class: "causes by" },
    make("caption", {}, isEarlier
      ? `What made the ${word} value ${words}, ${engineering(value, unit)} at ${engineering(time, "s")}`
      : `What made the ${word} value, ${engineering(value, unit)} at ${engineering(time, "s")}, ${words}`),
    make("thead", {}, head), make("tbody", {}, ...rows)));
}

function barOf(value, largest) {
  const svg = document.createElementNS(svgNames, "svg");
  for (const [k, v] of Object.entries({ class: "bar", viewBox: "0 0 124 12", width: 124, height: 12, "aria-hidden": "true" })) svg.setAttribute(k, v);
  shape(svg, "path", { class: "rule", d: "M62 0V12" });
  const width = 60 * Math.abs(value) / largest;
  shape(svg, "rect", { class: "mark", x: value < 0 ? 62 - width : 62, y: 2, width, height: 8 });
  return svg;
}

function followExtremes(view, scales) {
  const line = view.section.querySelector(".extremes");
  line.classList.toggle("explored", !isSolved(scales));
  if (isSolved(scales)) {
    restore(line);
    return;
  }
  const { extremes: { max, min }, unit, total } = view.model;
  const most = Math.max(Math.abs(max.value), Math.abs(min.value));
  const strong = (value) => make("strong", {}, engineering(Math.abs(value) < 1e-12 * most ? 0 : value, unit));
  rewrite(line, "As scaled: highest ", strong(max.value), ` at ${engineering(max.time, "s")}; lowest `, strong(min.value),
    ` at ${engineering(min.time, "s")}; ${engineering(total[total.length - 1], unit)} at the end.`);
}

function usedOf({ lower, upper, settles }, value) {
  if (settles) return Math.abs(value - (upper + lower) / 2) / ((upper - lower) / 2);
  if (lower === undefined && upper > 0) return Math.max(0, value / upper);
  if (lower < 0 && upper > 0) return Math.max(value / upper, value / lower);
  return upper === undefined && lower > 0 && value > 0 ? lower / value : undefined;
}

function markOf(used) {
  if (used === undefined) return make("span", { class: "aside" }, "no ratio");
  const svg = document.createElementNS(svgNames, "svg");
  for (const [k, v] of Object.entries({ class: "scale", viewBox: "0 0 134 16", width: 134, height: 16, "aria-hidden": "true" })) svg.setAttribute(k, v);
  const place = 4 + 100 * Math.min(used, 1.25);
  shape(svg, "path", { class: "rule", d: "M4 8H129M4 5V11" });
  shape(svg, "path", { class: "limit", d: "M104 1V15" });
  shape(svg, "path", { class: "reach", d: `M4 8H${place}` });
  if (used > 1.25) shape(svg, "path", { class: "mark", d: "M125 3L132 8L125 13Z" });
  else shape(svg, "circle", { class: "mark", cx: place, cy: 8, r: 4 });
  return make("span", { class: "used" }, svg, " ", make("span", { class: "percent" }, percent(used)));
}

function followRow(row, scales, item, verdict) {
  const cells = [...row.querySelectorAll("td")];
  row.classList.toggle("broken", !item.holds);
  if (isSolved(scales)) {
    cells.forEach(restore);
    return item.holds;
  }
  if (item.wave === undefined) {
    rewrite(cells[0], ...(written.get(cells[0]) ?? cells[0].childNodes), make("br"), make("span", { class: "aside" }, "as solved; does not follow the causes here"));
    return item.holds;
  }
  const { holds, words, worst, used } = verdict();
  row.classList.toggle("broken", !holds);
  rewrite(cells[0], words);
  rewrite(cells[1], worst);
  rewrite(cells[2], markOf(used));
  return holds;
}

function followVerdict(scales) {
  const held = data.requirements.map((item, i) => followRow(
    document.querySelector(`[data-requirement="${i}"]`), scales, item, () => {
      const { worst, margin, holds } = judge(item, scales);
      const words = holds ? `held, ${engineering(margin, item.unit)} to spare` : `broken by ${engineering(-margin, item.unit)}`;
      return { holds, words, worst: `${engineering(worst.value, item.unit)} at ${engineering(worst.time, "s")}`, used: usedOf(item, worst.value) };
    }));
  const rated = data.ratings.map((item, i) => followRow(
    document.querySelector(`[data-rating="${i}"]`), scales, item, () => {
      const reached = reach(item, scales);
      const holds = reached <= item.rated;
      const words = holds ? "held" : `exceeded by ${engineering(reached - item.rated, item.unit)}`;
      return { holds, words, worst: `${engineering(reached, item.unit)} of ${engineering(item.rated, item.unit)}`, used: reached / item.rated };
    }));
  const left = data.linearLimits.filter((item) =>
    item.wave === undefined ? !item.holds : reach(item, scales) > item.rated).length;
  const doubt = left === 0 ? "" : left === 1 ? "one part leaves the range its value is good for"
    : `${left} parts leave the range their values are good for`;
  const said = [tally(held, "requirement", "broken"), tally(rated, "rating", "exceeded"), doubt].filter((s) => s).join("; ");
  const lead = document.getElementById("verdict-words");
  const sentence = !data.checksHold ? "A self-check failed: do not use these figures."
    : said ? `${said[0].toUpperCase()}${said.slice(1)}.` : "Nothing was required or rated, so there is no verdict.";
  lead.classList.toggle("explored", !isSolved(scales));
  if (isSolved(scales)) restore(lead); else rewrite(lead, `With the causes as scaled: ${sentence}`);
  return sentence;
}

function tally(verdicts, noun, otherwise) {
  const [all, holding] = [verdicts.length, verdicts.filter((v) => v).length];
  if (all === 0) return "";
  if (all === 1) return holding === 1 ? `the ${noun} holds` : `the ${noun} is ${otherwise}`;
  if (all === 2 && holding !== 1) return `both ${noun}s ${holding === 2 ? "hold" : `are ${otherwise}`}`;
  if (holding === 0) return `all ${all} ${noun}s are ${otherwise}`;
  if (holding === all) return `all ${all} ${noun}s hold`;
  return holding === all - 1 ? `one of ${all} ${noun}s is ${otherwise}` : `${all - holding} of ${all} ${noun}s are ${otherwise}`;
}

function follow() {
  const scales = scalesNow();
  drawAll();
  const sentence = followVerdict(scales);
  const changed = scales.flatMap((s, c) => (s === 1 ? [] : [`${data.causes[c].slice(0, 60)} ${s === 0 ? "off" : `× ${s.toFixed(2)}`}`]));
  const more = changed.length > 4 ? ` and ${changed.length - 4} more` : "";
  document.getElementById("explored").textContent = changed.length === 0
    ? "Causes as solved."
    : `${changed.slice(0, 4).join(", ")}${more}. ${sentence}`;
  document.getElementById("reset").disabled = changed.length === 0;
  document.querySelector(".state").classList.toggle("explored", changed.length > 0);
}

function causeRow(c) {
  const id = `cause-${c}`;
  const name = data.causes[c];
  const box = make("input", { type: "checkbox", id });
  box.checked = true;
  const range = make("input", { type: "range", min: "0", max: "2", step: "0.01", value: "1", "aria-label": `Scale of ${name.slice(0, 200)}` });
  const output = make("output", {}, "× 1.00");
  const show = () => {
    output.textContent = `× ${(state.on[c] ? state.scale[c] : 0).toFixed(2)}`;
    range.setAttribute("aria-valuetext", `${state.scale[c].toFixed(2)} times`);
    follow();
  };
  box.addEventListener("change", () => { state.on[c] = box.checked; show(); });
  range.addEventListener("input", () => {
    state.scale[c] = Number(range.value);
    state.on[c] = true;
    box.checked = true;
    show();
  });
  range.addEventListener("dblclick", () => { range.value = "1"; range.dispatchEvent(new Event("input")); });
  const svg = document.createElementNS(svgNames, "svg");
  for (const [k, v] of Object.entries({ viewBox: "0 0 32 10", width: 32, height: 10, "aria-hidden": "true" })) svg.setAttribute(k, v);
  shape(svg, "path", { class: `key c${c % 6}`, d: "M0 5H32" });
  const label = make("label", { for: id, title: name.slice(0, 500) }, make("bdi", {}, name.slice(0, 500)));
  return { row: make("div", { class: "cause" }, box, svg, label, range, output), box, range, output };
}

function buildExplorer() {
  const rows = data.causes.map((_, c) => causeRow(c));
  const reset = make("button", { type: "button", id: "reset", disabled: "" }, "As solved");
  reset.addEventListener("click", () => {
    rows.forEach(({ box, range, output }, c) => {
      [state.on[c], state.scale[c], box.checked, range.value, output.textContent] = [true, 1, true, "1", "× 1.00"];
    });
    follow();
  });
  const origin = make("select", {}, make("option", { value: "" }, "the start"),
    ...data.events.filter((e) => e.time > 0).map((e) => make("option", { value: e.time }, e.name.slice(0, 60))));
  const log = make("input", { type: "checkbox", id: "logarithmic" });
  const axis = () => {
    const event = data.events.find((e) => String(e.time) === origin.value);
    shared.axis = { origin: event?.time ?? 0, originName: event?.name, log: log.checked };
    const whole = shared.whole();
    shared.zoom(event && !log.checked ? { from: event.time, to: data.until } : whole);
  };
  origin.addEventListener("change", axis);
  log.addEventListener("change", axis);
  const lines = make("select", {}, make("option", { value: "largest" }, "the six largest"), make("option", { value: "all" }, "all"), make("option", { value: "none" }, "none"));
  lines.addEventListener("change", () => { state.lines = lines.value; drawAll(); });
  const controls = make("div", { class: "controls" },
    make("label", {}, "Time from ", origin), make("label", {}, log, "logarithmic time"), make("label", {}, "Contributions drawn ", lines));
  const note = make("p", { class: "note", id: "keys" },
    "On a waveform: drag to zoom, double-click for the whole. Keys: arrows read, Shift and arrows go by sample, + and − zoom, 0 shows the whole, p goes to the peak, e to the next event. Scaling a cause keeps the instants at which switches act as solved." + (data.breakdowns.length > 0 ? " Each waveform has a menu of how its contributions are counted; they follow the scales of the causes they come from." : ""));
  const causes = make("div", { class: "causes-list", role: "group", "aria-label": "Causes" }, ...rows.map((r) => r.row));
  const details = make("details", {}, make("summary", {}, "Switch causes on and off, or scale them from 0 to 2"), causes, controls, note);
  details.open = window.innerWidth > 900 && window.innerHeight > 700;
  explorer.append(
    make("div", { class: "state" }, make("p", { id: "explored", role: "status" }, "Causes as solved."), reset), details);
}

buildExplorer();
const near = new IntersectionObserver((entries) => {
  for (const entry of entries) {
    const view = views.find((v) => v.section === entry.target);
    view.isNear = entry.isIntersecting;
    if (view.isNear && view.isDirty) drawView(view);
  }
}, { rootMargin: "300px" });
views.forEach((view) => near.observe(view.section));
let width = window.innerWidth;
new ResizeObserver(() => {
  document.documentElement.style.scrollPaddingTop = `${explorer.offsetHeight + 12}px`;
  // What scrolls sideways must be reached by keyboard too.
  document.querySelectorAll(".wide").forEach((box) => {
    if (box.scrollWidth > box.clientWidth) box.tabIndex = 0; else box.removeAttribute("tabindex");
  });
  if (window.innerWidth !== width) {
    width = window.innerWidth;
    drawAll();
  }
}).observe(document.body);
window.addEventListener("beforeprint", () => { state.printWidth = 720; drawAll(); });
window.addEventListener("afterprint", () => { state.printWidth = undefined; drawAll(); });
