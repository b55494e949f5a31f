// Reading and zooming a panel with pointer and keys.
function readoutOf(model, time, axis) {
  const { times, unit } = model;
  const total = valueAt(times, model.total, time);
  const parts = model.parts.map((values, c) => ({ name: model.names[c], value: valueAt(times, values, time) }))
    .filter((p) => p.value !== 0 && Number.isFinite(p.value))
    .sort((a, b) => Math.abs(b.value) - Math.abs(a.value));
  const since = data.events.filter((e) => e.time <= time).pop();
  const after = since && since.time > 0 ? ` (${engineering(time - since.time, "s")} after ${since.name})` : "";
  const when = axis.originName && time >= axis.origin
    ? `${engineering(time - axis.origin, "s")} after ${axis.originName}`
    : engineering(time, "s") + after;
  const shown = parts.slice(0, 6).map((p) => `\u2068${p.name.slice(0, 80)}\u2069 ${signed(p.value, unit)}`);
  const rest = parts.length > 6 ? `, and ${parts.length - 6} more` : "";
  const words = shown.length > 0 ? ` = ${shown.join(", ")}${rest}` : "";
  return { when, total: engineering(total, unit), parts: words };
}

// A number without an exponent, which assistive technology does not read.
const plain = (value) =>
  value === 0 ? "0" : value.toFixed(Math.min(20, Math.max(0, 16 - Math.floor(Math.log10(Math.abs(value))))));

// A panel in the page: draws itself, listens, and tells where it is read.
class Panel {
  constructor(host, source, own, shared) {
    [this.host, this.source, this.own, this.shared] = [host, source, own, shared];
    this.box = document.createElement("div");
    this.box.className = "panel";
    this.box.tabIndex = 0;
    this.box.setAttribute("role", "slider");
    this.box.setAttribute("aria-orientation", "horizontal");
    this.box.setAttribute("aria-describedby", "keys");
    this.svg = document.createElementNS(svgNames, "svg");
    this.svg.setAttribute("aria-hidden", "true");
    this.box.append(this.svg);
    this.readout = document.createElement("p");
    this.readout.className = "readout";
    host.append(this.box, this.readout);
    const { name, max, min } = source.observation;
    this.box.setAttribute("aria-label", `Waveform of ${name.slice(0, 200)}${own ? `, close-up: ${own.words}` : ""}`);
    this.tell((max ?? min ?? [0, 0])[1], "not read yet");
    this.clip = `clip-${Panel.count = (Panel.count ?? 0) + 1}`;
    this.listen();
  }

  get axis() { return this.own ?? this.shared.axis; }
  get window() { return this.zoomed ?? this.own ?? this.shared.window; }

  draw(model, width) {
    this.model = model;
    this.drawn = drawPanel(this.svg, model, this.window, this.axis, Math.max(280, width), this.clip);
    this.overlay = shape(this.svg, "g", {});
    this.cursor = Math.min(this.window.to, Math.max(this.window.from, this.cursor ?? model.extremes[model.side].time));
    this.speak();
    if (this.isRead) this.mark();
  }

  speak() {
    const { when, total, parts } = readoutOf(this.model, this.cursor, this.axis);
    this.tell(this.cursor, `${when}: total ${total}${parts}`);
  }

  tell(now, text) {
    const attributes = {
      "aria-valuemin": plain(this.window.from), "aria-valuemax": plain(this.window.to), "aria-valuenow": plain(now), "aria-valuetext": text,
    };
    for (const [name, value] of Object.entries(attributes)) this.box.setAttribute(name, value);
  }

  read(time) {
    this.cursor = Math.min(this.window.to, Math.max(this.window.from, time));
    this.isRead = true;
    this.speak();
    this.mark();
  }

  mark() {
    const { frame, time, level } = this.drawn;
    const { when, total, parts } = readoutOf(this.model, this.cursor, this.axis);
    const strong = document.createElement("b");
    strong.textContent = `total ${total}`;
    this.readout.replaceChildren(`${when}: `, strong, parts);
    const x = time.place(this.cursor);
    this.overlay.replaceChildren();
    shape(this.overlay, "path", { class: "cursor", d: `M${x} ${frame.top}V${frame.bottom}` });
    const y = level.place(valueAt(this.model.times, this.model.total, this.cursor));
    if (y >= frame.top && y <= frame.bottom) shape(this.overlay, "circle", { class: "peak", cx: x, cy: y, r: 3.5 });
  }

  leave() {
    this.isRead = false;
    this.readout.replaceChildren();
    this.overlay?.replaceChildren();
  }

  zoom(from, to) {
    const { axis } = this;
    const whole = this.own ?? this.shared.whole();
    const least = axis.log && !this.own ? whole.from : 0;
    const window = { from: Math.max(least, from), to: Math.min(data.until, to) };
    if (!(window.to - window.from > 1e-13 * data.until)) return;
    if (this.own) {
      this.zoomed = window;
      this.shared.draw();
    } else {
      this.shared.zoom(window);
    }
  }

  whole() {
    this.zoomed = undefined;
    if (this.own) this.shared.draw(); else this.shared.zoom(undefined);
  }

  listen() {
    const at = (event) => {
      const box = this.svg.getBoundingClientRect();
      return (event.clientX - box.left) * this.svg.viewBox.baseVal.width / box.width;
    };
    this.box.addEventListener("pointerdown", (event) => {
      if (event.button !== 0) return;
      this.start = at(event);
      this.box.setPointerCapture(event.pointerId);
    });
    this.box.addEventListener("pointermove", (event) => {
      if (!this.drawn) return;
      const x = at(event);
      this.read(this.drawn.time.time(x));
      if (this.start === undefined || Math.abs(x - this.start) < 4) return;
      const { frame } = this.drawn;
      const [a, b] = [this.start, x].map((p) => Math.min(frame.right, Math.max(frame.left, p))).sort((p, q) => p - q);
      shape(this.overlay, "rect", { class: "choice", x: a, y: frame.top, width: b - a, height: frame.bottom - frame.top });
    });
    this.box.addEventListener("pointerup", (event) => {
      const [start, x] = [this.start, at(event)];
      this.start = undefined;
      if (start === undefined || !this.drawn) return;
      if (Math.abs(x - start) < 6) this.read(this.drawn.time.time(x));
      else this.zoom(...[start, x].map((p) => this.drawn.time.time(p)).sort((p, q) => p - q));
    });
    this.box.addEventListener("pointercancel", () => { this.start = undefined; this.leave(); });
    this.box.addEventListener("pointerleave", () => { if (document.activeElement !== this.box) this.leave(); });
    this.box.addEventListener("dblclick", () => this.whole());
    this.box.addEventListener("focus", () => { if (this.drawn && this.box.matches(":focus-visible")) this.read(this.cursor); });
    this.box.addEventListener("blur", () => this.leave());
    this.box.addEventListener("keydown", (event) => this.press(event));
  }

  press(event) {
    if (event.ctrlKey || event.altKey || event.metaKey || !this.drawn) return;
    const { time } = this.drawn;
    const step = (pixels) => this.read(time.time(time.place(this.cursor) + pixels));
    const sample = (by) => {
      const { times } = this.model;
      const i = firstAt(times, this.cursor);
      this.read(by < 0 ? times[Math.max(0, i - 1)] : times[Math.min(times.length - 1, times[i] > this.cursor ? i : firstAt(times, times[i] * (1 + 1e-15) + 1e-300))]);
    };
    const near = (share) => {
      const x = time.place(this.cursor);
      this.zoom(time.time(x - (x - time.left) * share), time.time(x + (time.right - x) * share));
    };
    const wider = () => {
      const { from, to } = this.window;
      this.zoom(this.cursor - 2 * (this.cursor - from), this.cursor + 2 * (to - this.cursor));
    };
    const nextEvent = () => {
      const later = data.events.filter((e) => e.time > this.cursor && e.time <= this.window.to)[0] ?? data.events.filter((e) => e.time >= this.window.from)[0];
      if (later) this.read(later.time);
    };
    const peak = () => {
      const { extremes, side } = this.model;
      const [first, second] = [extremes[side].time, extremes[side === "max" ? "min" : "max"].time];
      this.show(this.cursor === first ? second : first);
    };
    const actions = {
      ArrowRight: () => (event.shiftKey ? sample(1) : step(4)), ArrowLeft: () => (event.shiftKey ? sample(-1) : step(-4)),
      ArrowUp: () => step(4), ArrowDown: () => step(-4),
      PageUp: () => step((time.right - time.left) / 10), PageDown: () => step((time.left - time.right) / 10),
      Home: () => this.read(this.window.from), End: () => this.read(this.window.to),
      "+": () => near(0.5), "=": () => near(0.5), "-": wider, 0: () => this.whole(), Escape: () => this.whole(),
      e: nextEvent, p: peak,
    };
    const action = actions[event.key];
    if (!action) return;
    event.preventDefault();
    action();
  }

  // Goes to an instant, widening the view where it lies outside.
  show(time) {
    if (time < this.window.from || time > this.window.to) this.whole();
    this.read(time);
  }
}
