// One panel: a waveform over a stretch of time, drawn as SVG and thinned to the columns of the screen.
const svgNames = "http://www.w3.org/2000/svg";
const ruler = document.createElement("canvas").getContext("2d");

function shape(parent, name, attributes, text) {
  const element = document.createElementNS(svgNames, name);
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, value);
  if (text !== undefined) element.textContent = text;
  parent.append(element);
  return element;
}

function widthOf(text, strong = false) {
  ruler.font = `${strong ? 600 : 400} 12px ${getComputedStyle(document.body).fontFamily}`;
  return ruler.measureText(text).width;
}

// A name within a width, kept apart from the writing direction around it.
function fitted(text, limit, strong) {
  let runes = [...text].slice(0, 200);
  const isWhole = runes.length === [...text].length;
  if (isWhole && widthOf(text, strong) <= limit) return `\u2068${text}\u2069`;
  while (runes.length > 1 && widthOf(runes.join("") + "…", strong) > limit) runes = runes.slice(0, -1);
  return `\u2068${runes.join("")}…\u2069`;
}

function timeScale(window, axis, left, right) {
  const origin = axis.log ? axis.origin : 0;
  const f = axis.log ? (t) => Math.log10(Math.max(t - origin, 1e-300)) : (t) => t;
  const back = axis.log ? (u) => origin + 10 ** u : (u) => u;
  const [a, b] = [f(window.from), f(window.to)];
  return {
    left, right, from: window.from, to: window.to,
    place: (t) => left + (f(t) - a) / (b - a) * (right - left),
    timeAt: (x) => back(a + (x - left) / (right - left) * (b - a)),
    time: (x) => back(a + (Math.min(right, Math.max(left, x)) - left) / (right - left) * (b - a)),
  };
}

// First, least, greatest and last of each half column, as a path.
function pathOf(times, values, scale, place) {
  let [path, pen, column, entry] = ["", false, -1e9, null];
  const put = (x, y) => {
    path += (pen ? "L" : "M") + x.toFixed(1) + " " + y.toFixed(1);
    pen = true;
  };
  const flush = () => {
    if (!entry) return;
    const { first, least, greatest, last } = entry;
    for (const k of [...new Set([first, Math.min(least, greatest), Math.max(least, greatest), last])]) {
      put(scale.place(times[k]), place(values[k]));
    }
    entry = null;
  };
  // At a jump on the window's edge only the inner side is drawn.
  const edge = firstAt(times, scale.from);
  const start = times[edge] === scale.from && times[edge + 1] === scale.from ? edge + 1 : Math.max(0, edge - 1);
  for (let i = start; i < times.length; i++) {
    if (times[i] === scale.to && times[i - 1] === scale.to && i > start) break;
    const value = values[i];
    if (!Number.isFinite(value)) {
      flush();
      [pen, column] = [false, -1e9];
      continue;
    }
    const here = scale.place(times[i]);
    if (times === allTimes && i > start && Number.isFinite(values[i - 1]) && here - scale.place(times[i - 1]) > 6) {
      flush();
      column = -1e9;
      const first = Math.max(scale.place(times[i - 1]) + 3, scale.left - 6);
      for (let x = first; x < Math.min(here - 1, scale.right + 6); x += 3) put(x, place(between(times, values, i, scale.timeAt(x))));
    }
    const next = Math.floor(here * 2);
    if (next !== column) {
      flush();
      [column, entry] = [next, { first: i, least: i, greatest: i, last: i }];
    } else {
      if (value < values[entry.least]) entry.least = i;
      if (value > values[entry.greatest]) entry.greatest = i;
      entry.last = i;
    }
    if (times[i] > scale.to) break;
  }
  flush();
  return path;
}

function rangeIn(times, values, from, to) {
  const max = extremeOf(times, values, from, to, 1).value;
  const min = extremeOf(times, values, from, to, -1).value;
  return Number.isFinite(max) && Number.isFinite(min) ? [min, max] : [0, 0];
}

// Levels from the total, its parts within reach, and the limits near it.
function levels(model, window) {
  const { times, total, lines, limits } = model;
  let [least, greatest] = rangeIn(times, total, window.from, window.to);
  const span = Math.max(greatest - least, 0.2 * Math.max(Math.abs(least), Math.abs(greatest)));
  const solved = rangeIn(times, model.solved, window.from, window.to);
  const reaches = [...lines.map((l) => rangeIn(times, l.values, window.from, window.to)), solved];
  const [l0, g0] = [least, greatest];
  for (const [low, high] of reaches) {
    least = Math.min(least, Math.max(low, l0 - 2 * span));
    greatest = Math.max(greatest, Math.min(high, g0 + 2 * span));
  }
  for (const limit of limits) {
    const far = 0.8 * (greatest - least);
    if (limit.value > least - far && limit.value < greatest + far) {
      [least, greatest] = [Math.min(least, limit.value), Math.max(greatest, limit.value)];
    }
  }
  if (least * greatest > 0 && Math.min(Math.abs(least), Math.abs(greatest)) < 0.6 * Math.max(Math.abs(least), Math.abs(greatest))) {
    [least, greatest] = [Math.min(0, least), Math.max(0, greatest)];
  }
  const room = greatest > least ? greatest - least : Math.abs(greatest) || 1;
  return [least - 0.14 * room, greatest + 0.14 * room];
}

// Places at least a gap apart and within bounds, each near its wish; the wishes come in order.
function apart(wishes, gap, first, last) {
  const places = [...wishes];
  for (let i = 0; i < places.length; i++) places[i] = Math.max(places[i], i === 0 ? first : places[i - 1] + gap);
  for (let i = places.length - 1; i >= 0; i--) {
    places[i] = Math.min(places[i], i === places.length - 1 ? last : places[i + 1] - gap);
  }
  return places;
}

function drawGrid(svg, frame, model, time, level, axis) {
  const { left, right, top, bottom } = frame;
  const heights = ticks(level.from, level.to, model.unit, 5);
  for (const { value, label } of heights.marks) {
    const y = level.place(value);
    shape(svg, "path", { class: value === 0 ? "zero" : "grid", d: `M${left} ${y}H${right}` });
    shape(svg, "text", { class: "small", x: left - 8, y: y + 4, "text-anchor": "end" }, label);
  }
  shape(svg, "text", { class: "strong", x: left - 8, y: top - 8, "text-anchor": "end" }, heights.unit);
  const [from, to] = [time.from - axis.origin, time.to - axis.origin];
  const instants = axis.log ? decades(from, to) : ticks(from, to, "s", Math.max(3, Math.round((right - left) / 95)));
  for (const { value, label } of instants.marks) {
    const x = time.place(value + axis.origin);
    shape(svg, "path", { class: "grid", d: `M${x} ${top}V${bottom}` });
    shape(svg, "text", { class: "small", x, y: bottom + 17, "text-anchor": "middle" }, label);
  }
  const since = axis.originName ? `after ${axis.originName}` : "time";
  const words = axis.log ? since : axis.originName ? `${instants.unit} ${since}` : `time (${instants.unit})`;
  shape(svg, "text", { class: "strong", x: right, y: bottom + 34, "text-anchor": "end" }, fitted(words, right - left, true));
}

function drawEvents(svg, frame, time) {
  let end = -1e9;
  for (const event of data.events) {
    if (event.time < time.from || event.time > time.to) continue;
    const x = time.place(event.time);
    shape(svg, "path", { class: "event", d: `M${x} ${frame.top - 4}V${frame.bottom}` });
    const words = fitted(event.name, frame.width / 3);
    const start = Math.min(Math.max(x + 4, frame.left), frame.right - widthOf(words));
    if (start > end + 8) {
      shape(svg, "text", { class: "small halo", x: start, y: frame.top - 8 }, words);
      end = start + widthOf(words);
    }
  }
}

// Words of a limit go where no peak's label stands: at its right end or its left, outside it or inside.
function drawLimits(svg, frame, model, time, level, taken) {
  for (const limit of model.limits) {
    if (limit.to <= time.from || limit.from >= time.to) continue;
    const y = level.place(limit.value);
    const [x1, x2] = [time.place(Math.max(limit.from, time.from)), time.place(Math.min(limit.to, time.to))];
    const isIn = y > frame.top && y < frame.bottom;
    if (isIn) shape(svg, "path", { class: "bound", d: `M${x1} ${y}H${x2}` });
    const words = isIn ? limit.words : `${limit.words}: ${y <= frame.top ? "above" : "below"} this panel`;
    const length = widthOf(words);
    const [over, under] = [y - 5, y + 15];
    const heights = isIn ? (limit.words.startsWith("at most") ? [over, under] : [under, over])
      : [y <= frame.top ? frame.top + 14 : frame.bottom - 6];
    const starts = [Math.max(frame.left + 4, x2 - 6 - length), x1 + 6];
    const places = heights.flatMap((base) => starts.map((x) => ({ x, base, length })));
    const free = places.find((p) => taken.every((t) => !overlaps(p, t))) ?? places[0];
    taken.push(free);
    shape(svg, "text", { class: "bound-words halo", x: free.x, y: free.base }, words);
  }
}

const overlaps = (a, b) =>
  a.x < b.x + b.length + 4 && b.x < a.x + a.length + 4 && Math.abs(a.base - b.base) < 14;

function drawEnds(svg, frame, model, time, level) {
  const last = (values) => valueAt(model.times, values, Math.min(time.to, model.times[model.times.length - 1]));
  const ends = [...model.lines, { name: "total", values: model.total, style: "total", strong: true }]
    .map((line) => ({ ...line, y: Math.min(frame.bottom, Math.max(frame.top, level.place(last(line.values)))) }))
    .filter((line) => Number.isFinite(line.y))
    .sort((a, b) => a.y - b.y);
  const places = apart(ends.map((e) => e.y), 15, frame.top + 2, frame.bottom - 2);
  ends.forEach((end, i) => {
    const style = end.strong ? "total" : `key ${end.style}`;
    shape(svg, "path", { class: style, d: `M${frame.right + 3} ${end.y}L${frame.right + 20} ${places[i]}` });
    const words = fitted(end.name, frame.width - frame.right - 28, end.strong);
    shape(svg, "text", { class: end.strong ? "strong" : "", x: frame.right + 25, y: places[i] + 4 }, words);
  });
}

function drawPeaks(svg, frame, model, time, level) {
  const taken = [];
  for (const side of ["max", "min"]) {
    const { value, time: instant } = model.extremes[side];
    if (!Number.isFinite(value) || instant < time.from || instant > time.to) continue;
    if (side === "min" && value === model.extremes.max.value) continue;
    const other = model.extremes[side === "min" ? "max" : "min"].value;
    if (Math.abs(value) < 1e-12 * Math.abs(other)) continue; // what rounding left of nothing
    const [x, y] = [time.place(instant), level.place(value)];
    const text = `${engineering(value, model.unit)} at ${engineering(instant, "s")}`;
    const half = widthOf(text, true) / 2;
    const start = Math.min(Math.max(x, frame.left + half + 4), frame.right - half - 4);
    const near = model.lines.map((l) => level.place(valueAt(model.times, l.values, instant)))
      .filter((p) => Math.abs(p - y) < 34).concat(y);
    const base = side === "max" ? Math.max(Math.min(...near) - 9, frame.top + 12) : Math.min(Math.max(...near) + 19, frame.bottom - 4);
    shape(svg, "circle", { class: "peak", cx: x, cy: y, r: 4.5 });
    shape(svg, "text", { class: "strong halo", x: start, y: base, "text-anchor": "middle" }, text);
    taken.push({ x: start - half, base, length: 2 * half });
  }
  return taken;
}

// Draws a panel anew and returns what pointing at it needs.
function drawPanel(svg, model, window, axis, width, clip) {
  const isNarrow = width < 640;
  const height = state.printWidth ? 232 : isNarrow ? 250 : 300;
  const names = Math.max(0, ...model.lines.map((line) => widthOf([...line.name].slice(0, 60).join(""))));
  const frame = {
    left: isNarrow ? 46 : 62, right: width - (isNarrow ? 96 : Math.min(0.26 * width, Math.max(178, names + 36))), top: 30, bottom: height - 44, width,
  };
  const time = timeScale(window, axis, frame.left, frame.right);
  const [from, to] = levels(model, window);
  const level = { from, to, place: (v) => frame.bottom - (v - from) / (to - from) * (frame.bottom - frame.top) };
  svg.replaceChildren();
  svg.setAttribute("viewBox", `0 0 ${width} ${height}`);
  shape(shape(shape(svg, "defs", {}), "clipPath", { id: clip }), "rect", {
    x: frame.left, y: frame.top, width: frame.right - frame.left, height: frame.bottom - frame.top,
  });
  drawGrid(svg, frame, model, time, level, axis);
  drawEvents(svg, frame, time);
  const inner = shape(svg, "g", { "clip-path": `url(#${clip})` });
  const line = (style, values) => shape(inner, "path", { class: style, d: pathOf(model.times, values, time, level.place) });
  if (model.solved !== model.total) line("solved", model.solved);
  for (const part of model.lines) line(`part ${part.style}`, part.values);
  line("total", model.total);
  drawEnds(svg, frame, model, time, level);
  drawLimits(svg, frame, model, time, level, drawPeaks(svg, frame, model, time, level));
  return { frame, time, level };
}
