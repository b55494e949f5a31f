// Numbers as the tool writes them: four significant digits, the prefix that leaves one to three digits before
// the point.
const prefixes = { "-15": "f", "-12": "p", "-9": "n", "-6": "µ", "-3": "m", 0: "", 3: "k", 6: "M", 9: "G", 12: "T" };
const raised = (n) => [...String(n)].map((d) => (d === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[d])).join("");

function engineering(value, unit, count = 4) {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? "undetermined" : value > 0 ? "infinite" : "-infinite";
  const tail = unit === "" ? "" : " " + unit;
  if (value === 0) return "0" + tail;
  const [mantissa, power] = Math.abs(value).toExponential(count - 1).split("e");
  const digits = mantissa.replace(".", "");
  const exponent = Number(power);
  const sign = value < 0 ? "-" : "";
  const place = (e) =>
    e < 0 ? "0." + "0".repeat(-e - 1) + digits
    : digits.length <= e + 1 ? digits.padEnd(e + 1, "0")
    : digits.slice(0, e + 1) + "." + digits.slice(e + 1);
  const times = (step) => (step === 0 ? "" : "·10" + raised(step));
  const prefixed = (e, end) => {
    const step = 3 * Math.floor(e / 3);
    return step in prefixes ? place(e - step) + " " + prefixes[step] + end.slice(1) : place(e - step) + times(step) + end;
  };
  if ((unit === "%" || unit === "°") && exponent >= -4 && exponent < 6) return sign + place(exponent) + tail;
  if ((unit === "V/s" || unit === "A/s") && exponent >= 3) {
    const fast = exponent >= 6;
    return sign + prefixed(exponent - (fast ? 6 : 3), " " + unit[0] + (fast ? "/µs" : "/ms"));
  }
  if (unit !== "" && unit !== "A²s" && unit !== "%" && unit !== "°") return sign + prefixed(exponent, tail);
  const step = exponent >= -2 && exponent < 3 ? 0 : 3 * Math.floor(exponent / 3);
  return sign + place(exponent - step) + times(step) + tail;
}

const signed = (value, unit) => (value > 0 ? "+" : "") + engineering(value, unit);

function percent(fraction) {
  const value = 100 * fraction;
  const text = value.toFixed(Math.abs(value) >= 1000 ? 0 : 1);
  return (text === "-0.0" ? "0.0" : text) + " %";
}

// Round values on an axis with their labels, and the unit the labels are in.
function ticks(from, to, unit, aim) {
  const width = (to - from) / aim;
  const power = 10 ** Math.floor(Math.log10(width));
  const lead = width / power;
  const step = power * (lead <= 1 + 1e-9 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10);
  const largest = Math.max(Math.abs(from), Math.abs(to));
  const exponent = unit === "%" || unit === "°" ? 0 : 3 * Math.floor(Math.log10(largest) / 3 + 1e-12);
  const plain = unit === "A²s" || unit === "%" || unit === "V/s" || unit === "A/s" || !(exponent in prefixes);
  const rate = (unit === "V/s" || unit === "A/s") && exponent in { 3: 0, 6: 0 };
  const name = rate ? unit[0] + (exponent === 6 ? "/µs" : "/ms")
    : !plain ? prefixes[exponent] + unit : exponent === 0 ? unit : "10" + raised(exponent) + " " + unit;
  const decimals = Math.max(0, -Math.floor(Math.log10(step / 10 ** exponent) + 1e-9));
  const marks = [];
  for (let i = Math.ceil(from / step - 1e-9); i * step <= to + 1e-9 * step; i++) {
    const value = i * step / 10 ** exponent;
    const label = decimals > 6 || Math.abs(value) >= 1e6 ? value.toExponential(3) : (value + 0).toFixed(decimals);
    marks.push({ value: i * step, label: Number(label) === 0 ? "0" : label.replace("-", "−") });
  }
  return { marks, unit: name };
}

// A mark at each power of ten; the axis starts above zero.
function decades(from, to) {
  const marks = [];
  const first = Math.ceil(Math.log10(from) - 1e-9);
  const last = Math.floor(Math.log10(to) + 1e-9);
  const stride = Math.max(1, Math.ceil((last - first + 1) / 9));
  for (let p = first; p <= last; p += stride) marks.push({ value: 10 ** p, label: engineering(10 ** p, "s", 1) });
  return { marks, unit: "" };
}
