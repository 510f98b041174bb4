/** A leg as the sequence sees it; `cents` is what is made least, `minutes` is what the windows are held against. */
export interface SequenceLeg {
  readonly minutes: number;
  readonly cents: number;
}

export interface SequenceStop {
  /** Service may start from here … */
  readonly openMinute: number;
  /** … until here; both ends count. */
  readonly closeMinute: number;
  readonly serviceMinutes: number;
  readonly fromStart: SequenceLeg;
  readonly toEnd: SequenceLeg;
}

export interface SequenceProblem {
  readonly stops: readonly SequenceStop[];
  /** `between[i][j]`: from stop i to stop j. */
  readonly between: readonly (readonly SequenceLeg[])[];
  readonly earliestDepartMinute: number;
  /** At the end by this minute; it counts. */
  readonly latestArriveMinute: number;
  /** From leaving the start to the end, waiting included. */
  readonly longestMinutes: number;
}

/** The best path through one set of stops. */
export interface Path {
  /** Indices of the stops in driving order. */
  readonly order: readonly number[];
  readonly cents: number;
  /** The latest safe departure, to spend no minute waiting that could be spent at home. */
  readonly departMinute: number;
}

/** Answers for every subset of the stops, subsets as bit masks. */
export interface SequenceTable {
  /** Infinity when no order keeps the windows. */
  cents(mask: number): number;
  path(mask: number): Path | null;
}

interface Labels {
  cents: Float64Array;
  /** Driving and service without waiting. */
  spent: Float64Array;
  /** Earliest minute at which one can be done at the last stop. */
  ready: Float64Array;
  /** Latest departure that keeps the windows so far. */
  latest: Float64Array;
  parent: Int32Array;
  next: Int32Array;
  last: Uint8Array;
  count: number;
}

/**
 * Exact dynamic programming over subsets (Bellman 1962; Held & Karp 1962) with the departure time left free. A partial
 * path that leaves at t is done at max(ready, t + spent) for t up to `latest`, so a label is (cents, spent, ready, latest)
 * and only a label no better in any of the four is dropped. Memory and time grow with 2^n · n; meant for 12 stops, works to 16.
 */
export function sequenceTable(problem: SequenceProblem): SequenceTable {
  const n = problem.stops.length;
  if (n > 16) throw new RangeError(`A sequence has at most 16 stops, not ${n}.`);
  const head = new Int32Array((1 << n) * n).fill(-1);
  const labels = emptyLabels(Math.max(64, (1 << n) * n));
  const flat = flatten(problem);
  for (let j = 0; j < n; j++) start(problem, labels, head, j);
  for (let mask = 1; mask < 1 << n; mask++)
    for (let j = 0; j < n; j++)
      for (let at = head[mask * n + j] as number; at !== -1; at = labels.next[at] as number)
        extend(problem, flat, labels, head, mask, at);
  const best = new Int32Array(1 << n).fill(-2);
  const find = (mask: number) => {
    if (best[mask] === -2) best[mask] = finish(problem, labels, head, mask);
    return best[mask] as number;
  };
  const totalCents = (at: number) => (labels.cents[at] as number) + endLeg(problem, labels, at).cents;
  return {
    cents: (mask) => {
      if (mask === 0) return 0;
      const at = find(mask);
      return at === -1 ? Infinity : totalCents(at);
    },
    path: (mask) => {
      const at = mask === 0 ? -1 : find(mask);
      if (at === -1) return null;
      const order: number[] = [];
      for (let k = at; k !== -1; k = labels.parent[k] as number) order.unshift(labels.last[k] as number);
      return { order, cents: totalCents(at), departMinute: latestDeparture(problem, labels, at) };
    },
  };
}

/** The best path through all the stops, or null when no order keeps the windows. */
export function bestPath(problem: SequenceProblem): Path | null {
  if (problem.stops.length === 0) return null;
  return sequenceTable(problem).path((1 << problem.stops.length) - 1);
}

interface Flat {
  readonly minutes: Float64Array;
  readonly cents: Float64Array;
  readonly open: Float64Array;
  readonly close: Float64Array;
  readonly service: Float64Array;
}

function flatten(problem: SequenceProblem): Flat {
  const legs = problem.between.flat();
  return {
    minutes: Float64Array.from(legs, (leg) => leg.minutes),
    cents: Float64Array.from(legs, (leg) => leg.cents),
    open: Float64Array.from(problem.stops, (stop) => stop.openMinute),
    close: Float64Array.from(problem.stops, (stop) => stop.closeMinute),
    service: Float64Array.from(problem.stops, (stop) => stop.serviceMinutes),
  };
}

function emptyLabels(size: number): Labels {
  return {
    cents: new Float64Array(size),
    spent: new Float64Array(size),
    ready: new Float64Array(size),
    latest: new Float64Array(size),
    parent: new Int32Array(size),
    next: new Int32Array(size),
    last: new Uint8Array(size),
    count: 0,
  };
}

function grow(labels: Labels): void {
  const bigger = emptyLabels(labels.parent.length * 2);
  for (const key of ['cents', 'spent', 'ready', 'latest', 'parent', 'next', 'last'] as const) {
    bigger[key].set(labels[key]);
    Object.assign(labels, { [key]: bigger[key] });
  }
}

function start(problem: SequenceProblem, labels: Labels, head: Int32Array, j: number): void {
  const stop = problem.stops[j] as SequenceStop;
  const { minutes, cents } = stop.fromStart;
  const earliest = problem.earliestDepartMinute;
  if (earliest + minutes > stop.closeMinute) return;
  const ready = Math.max(stop.openMinute, earliest + minutes) + stop.serviceMinutes;
  insert(
    problem,
    labels,
    head,
    (1 << j) * problem.stops.length + j,
    j,
    -1,
    cents,
    minutes + stop.serviceMinutes,
    ready,
    stop.closeMinute - minutes,
  );
}

function extend(
  problem: SequenceProblem,
  flat: Flat,
  labels: Labels,
  head: Int32Array,
  mask: number,
  at: number,
): void {
  const n = flat.open.length;
  const from = labels.last[at] as number;
  const spent = labels.spent[at] as number;
  const ready = labels.ready[at] as number;
  const cents = labels.cents[at] as number;
  const latest = labels.latest[at] as number;
  for (let k = 0; k < n; k++) {
    if (mask & (1 << k)) continue;
    const minutes = flat.minutes[from * n + k] as number;
    const arrive = ready + minutes;
    const close = flat.close[k] as number;
    if (arrive > close) continue;
    const service = flat.service[k] as number;
    const open = flat.open[k] as number;
    insert(
      problem,
      labels,
      head,
      (mask | (1 << k)) * n + k,
      k,
      at,
      cents + (flat.cents[from * n + k] as number),
      spent + minutes + service,
      (arrive > open ? arrive : open) + service,
      Math.min(latest, close - spent - minutes),
    );
  }
}

function insert(
  problem: SequenceProblem,
  labels: Labels,
  head: Int32Array,
  state: number,
  last: number,
  parent: number,
  cents: number,
  spent: number,
  ready: number,
  latest: number,
): void {
  // What is late already stays late, and what is long already stays long, whatever follows.
  if (latest < problem.earliestDepartMinute || ready > problem.latestArriveMinute) return;
  if (spent > problem.longestMinutes || ready - latest > problem.longestMinutes) return;
  let before = -1;
  for (let at = head[state] as number; at !== -1;) {
    const following = labels.next[at] as number;
    const c = labels.cents[at] as number,
      s = labels.spent[at] as number,
      r = labels.ready[at] as number,
      l = labels.latest[at] as number;
    if (c <= cents && s <= spent && r <= ready && l >= latest) return;
    if (cents <= c && spent <= s && ready <= r && latest >= l) {
      if (before === -1) head[state] = following;
      else labels.next[before] = following;
    } else before = at;
    at = following;
  }
  if (labels.count === labels.parent.length) grow(labels);
  const at = labels.count++;
  labels.cents[at] = cents;
  labels.spent[at] = spent;
  labels.ready[at] = ready;
  labels.latest[at] = latest;
  labels.parent[at] = parent;
  labels.last[at] = last;
  labels.next[at] = head[state] as number;
  head[state] = at;
}

const endLeg = (problem: SequenceProblem, labels: Labels, at: number): SequenceLeg =>
  (problem.stops[labels.last[at] as number] as SequenceStop).toEnd;

function latestDeparture(problem: SequenceProblem, labels: Labels, at: number): number {
  const { minutes } = endLeg(problem, labels, at);
  return Math.min(
    labels.latest[at] as number,
    problem.latestArriveMinute - (labels.spent[at] as number) - minutes,
  );
}

/** The cheapest label of a set that still reaches the end in time; the shorter run, then the later departure, on a tie. */
function finish(problem: SequenceProblem, labels: Labels, head: Int32Array, mask: number): number {
  const n = problem.stops.length;
  let best = -1;
  let bestKey: readonly [number, number, number] = [Infinity, Infinity, Infinity];
  for (let j = 0; j < n; j++)
    for (let at = head[mask * n + j] as number; at !== -1; at = labels.next[at] as number) {
      const leg = endLeg(problem, labels, at);
      const depart = latestDeparture(problem, labels, at);
      const arriveEarliest = (labels.ready[at] as number) + leg.minutes;
      if (depart < problem.earliestDepartMinute || arriveEarliest > problem.latestArriveMinute) continue;
      const length = Math.max(arriveEarliest - depart, (labels.spent[at] as number) + leg.minutes);
      if (length > problem.longestMinutes) continue;
      const key = [(labels.cents[at] as number) + leg.cents, length, -depart] as const;
      if (before(key, bestKey)) {
        best = at;
        bestKey = key;
      }
    }
  return best;
}

function before(a: readonly [number, number, number], b: readonly [number, number, number]): boolean {
  if (Math.abs(a[0] - b[0]) > 1e-7) return a[0] < b[0];
  return a[1] !== b[1] ? a[1] < b[1] : a[2] < b[2];
}
