// The samples shipped with the page, and sums of them with the causes scaled.
function bytesOf(text) {
  const raw = atob(text);
  const bytes = new Uint8Array(raw.length);
  for (let i = 0; i < raw.length; i++) bytes[i] = raw.charCodeAt(i);
  return bytes.buffer;
}

const data = JSON.parse(document.getElementById("data").textContent);
const allTimes = new Float64Array(bytesOf(data.times));
const decoded = (term) => ({ ...term, samples: new Float32Array(bytesOf(term.samples)) });
const waves = data.waves.map((wave) => {
  const index = wave.index && new Int32Array(bytesOf(wave.index));
  return {
    quadratic: wave.quadratic,
    factor: wave.factor,
    fixed: wave.terms.every((term) => term.cause === undefined),
    times: index ? Float64Array.from(index, (i) => allTimes[i]) : allTimes,
    terms: wave.terms.map(decoded),
    others: wave.others.map((other) => ({ ...other, terms: other.terms.map(decoded) })),
  };
});

const weight = (term, scales) =>
  term.cause === undefined ? 1 : scales[term.cause] * (term.with === undefined ? 1 : scales[term.with]);

function sumOf(wave, scales, chosen = () => true) {
  if (wave.factor === undefined) return sumOfTerms(wave, wave.terms, scales, chosen);
  const [first, second] = factorsOf(wave).map((terms) => sumOfTerms(wave, terms, scales, chosen));
  return first.map((v, i) => wave.factor * v * (second ?? first)[i]);
}

// The terms of a product's factors; one list where it is a square.
function factorsOf(wave) {
  const half = wave.terms.length / 2;
  return wave.terms.filter((t) => t.cause === 0).length === 1 ? [wave.terms] : [wave.terms.slice(0, half), wave.terms.slice(half)];
}

function sumOfTerms(wave, terms, scales, chosen) {
  const sum = new Float64Array(wave.times.length);
  for (const term of terms) {
    const w = chosen(term) ? weight(term, scales) : 0;
    if (w === 0) continue;
    const samples = term.samples;
    for (let i = 0; i < sum.length; i++) sum[i] += w * samples[i];
  }
  return sum;
}

// One waveform for each cause, and the joint one of a quadratic quantity after them.
function partsOf(wave, scales) {
  if (wave.fixed) return [];
  const own = data.causes.map((_, c) =>
    sumOf(wave, scales, (t) => t.cause === c && (t.with === undefined || t.with === c)));
  if (!wave.quadratic) return own;
  return [...own, wave.factor === undefined
    ? sumOf(wave, scales, (t) => t.with !== undefined && t.with !== t.cause)
    : sumOf(wave, scales).map((v, i) => own.reduce((rest, part) => rest - part[i], v))];
}

// One waveform for each cause of another breakdown: it grows with the causes that it comes from.
function partsBy(other, scales) {
  return other.terms.map(({ weights, samples }) => {
    const w = weights.reduce((sum, [cause, share]) => sum + share * scales[cause], 0);
    return Float64Array.from(samples, (v) => w * v);
  });
}

// The first sample not before an instant.
function firstAt(times, time) {
  let [low, high] = [0, times.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (times[middle] < time) low = middle + 1; else high = middle;
  }
  return low;
}

function valueAt(times, values, time) {
  const i = firstAt(times, time);
  if (i >= times.length) return values[times.length - 1];
  if (times[i] === time) return values[i + 1 < times.length && times[i + 1] === time ? i + 1 : i];
  if (i === 0) return values[0];
  return times === allTimes ? between(times, values, i, time)
    : values[i - 1] + (time - times[i - 1]) / (times[i] - times[i - 1]) * (values[i] - values[i - 1]);
}

// The slope at a sample, by the parabola through it and two others on its side of any jump; the samples of a
// wave that was not thinned are as dense as it moves, and a corner stands twice.
function slopeAt(times, values, i, side) {
  const has = (k) => k >= 0 && k < times.length && Number.isFinite(values[k]);
  const rise = (a, b) => (has(a) && has(b) && times[b] > times[a] ? (values[b] - values[a]) / (times[b] - times[a]) : undefined);
  const [left, right] = [rise(i - 1, i), rise(i, i + 1)];
  if (left !== undefined && right !== undefined) {
    const [a, b] = [times[i] - times[i - 1], times[i + 1] - times[i]];
    return (left * b + right * a) / (a + b);
  }
  const [near, far] = side > 0 ? [right, rise(i + 1, i + 2)] : [left, rise(i - 2, i - 1)];
  if (near === undefined || far === undefined) return near ?? 0;
  const [a, b] = side > 0 ? [times[i + 1] - times[i], times[i + 2] - times[i + 1]] : [times[i] - times[i - 1], times[i - 1] - times[i - 2]];
  return near + (near - far) * a / (a + b);
}

// The cubic between samples i - 1 and i.
function between(times, values, i, time) {
  const h = times[i] - times[i - 1];
  const u = (time - times[i - 1]) / h;
  const [v0, v1] = [values[i - 1], values[i]];
  const [s0, s1] = [h * slopeAt(times, values, i - 1, 1), h * slopeAt(times, values, i, -1)];
  return v0 + u * (s0 + u * (3 * (v1 - v0) - 2 * s0 - s1 + u * (2 * (v0 - v1) + s0 + s1)));
}

// The greatest (sign 1) or least (sign -1) value in a closed window: among the samples, then on the parabola
// through the greatest one and its neighbours. At a jump on the window's edge only the inner side counts.
function extremeOf(times, values, from, to, sign) {
  let best = -1;
  let [value, time] = [-Infinity, from];
  const start = firstAt(times, from);
  for (let i = start; i < times.length && times[i] <= to; i++) {
    if (times[i] === from && times[i + 1] === from) continue;
    if (times[i] === to && i > start && times[i - 1] === to) continue;
    if (sign * values[i] > value) [value, time, best] = [sign * values[i], times[i], i];
  }
  for (const edge of [from, to]) {
    const v = sign * valueAt(times, values, edge);
    if (times[firstAt(times, edge)] !== edge && v > value) [value, time, best] = [v, edge, -1];
  }
  if (best > 0 && best + 1 < times.length && times[best - 1] >= from && times[best + 1] <= to) {
    const [a, b] = [time - times[best - 1], times[best + 1] - time];
    if (a > 0 && b > 0) {
      const [rise, fall] = [(value - sign * values[best - 1]) / a, (value - sign * values[best + 1]) / b];
      const bend = (rise + fall) / (a + b);
      const shift = bend > 0 ? (rise * b - fall * a) / (a + b) / (2 * bend) : 0;
      if (shift > -a && shift < b && bend > 0) {
        time += shift;
        value += bend * shift * shift;
      }
    }
  }
  return { value: Number.isFinite(value) ? sign * value : NaN, time, index: best };
}

const solvedScales = data.causes.map(() => 1);
const isSolved = (scales) => scales.every((s) => s === 1);

// The extremes of an observation: the tool's own figures where the causes stand as it solved them or one is
// missing, else those of the samples.
function extremesOf(observation, scales, total) {
  const { times } = waves[observation.wave];
  const found = (sign) => extremeOf(times, total, observation.from, observation.to, sign);
  const extremes = { max: found(1), min: found(-1) };
  const off = scales.flatMap((s, c) => (s === 0 ? [c] : []));
  const others = scales.every((s) => s === 0 || s === 1);
  const known = isSolved(scales) ? observation
    : others && off.length === 1 ? observation.without[off[0]] : undefined;
  for (const side of ["max", "min"]) {
    if (known?.[side]) [extremes[side].value, extremes[side].time] = known[side];
  }
  return extremes;
}

// The verdict on a requirement with the causes scaled.
function judge(requirement, scales) {
  const wave = waves[requirement.wave];
  const values = sumOf(wave, scales);
  const { sign, lower, upper, from, to } = requirement;
  const most = extremeOf(wave.times, values, from, to, 1);
  const least = extremeOf(wave.times, values, from, to, -1);
  const [high, low] = sign > 0 ? [most, least] : [{ ...least, value: -least.value }, { ...most, value: -most.value }];
  const above = upper === undefined ? Infinity : upper - high.value;
  const below = lower === undefined ? Infinity : low.value - lower;
  const worst = above <= below ? high : low;
  return { worst, margin: Math.min(above, below), holds: Math.min(above, below) >= 0 };
}

// The figure a rating is held against, with the causes scaled.
function reach(rating, scales) {
  const wave = waves[rating.wave];
  const values = sumOf(wave, scales);
  const base = rating.atEnd
    ? Math.abs(values[values.length - 1])
    : Math.max(
      extremeOf(wave.times, values, 0, data.until, 1).value, -extremeOf(wave.times, values, 0, data.until, -1).value);
  return rating.factor * base ** rating.power;
}
