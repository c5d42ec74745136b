import { positivePart } from './integrateSpan';
import type { Trace } from './integrateSpan';

/** The discharge found in a trace. */
export interface DischargeWindow {
  startS: number;
  endS: number;
  /** First and last row under load. */
  firstIndex: number;
  lastIndex: number;
  legs: number;
  longestPauseS: number;
  /** Charge put in before and behind the window, Ah. */
  chargedOutsideAh: number;
  /** Other discharges of at least half its charge. */
  others: number;
}

/** Rows under load one behind the other. */
interface Run {
  first: number;
  last: number;
  dischargedAh: number;
  legs: number;
  longestPauseS: number;
  /** Charge put in between this run and the next, Ah. */
  chargedAfterAh: number;
}

/** Charging of more than this share of a discharge ends it (judgement: less is a counter's drift or a flicker of sun). */
const endingShare = 0.01;

/**
 * Finds the discharge of a log: the runs under load that no charging parts, those with most charge. Pauses are kept
 * inside; charging before and behind is left outside.
 * @returns undefined when no row is under load.
 */
export function findDischarge(trace: Trace): DischargeWindow | undefined {
  const runs = runsOf(trace);
  if (runs.length === 0) return undefined;
  const blocks = joinRuns(runs, trace);
  let best = 0;
  blocks.forEach((block, index) => {
    if (block.dischargedAh > (blocks[best]?.dischargedAh ?? 0)) best = index;
  });
  let whole = blocks[best]!;
  let [left, right] = [best, best];
  for (let grown = true; grown;) {
    grown = false;
    const before = blocks[left - 1];
    const after = blocks[right + 1];
    if (before && before.chargedAfterAh <= endingShare * whole.dischargedAh) {
      whole = joined(before, whole, trace);
      left -= 1;
      grown = true;
    }
    if (after && whole.chargedAfterAh <= endingShare * whole.dischargedAh) {
      whole = joined(whole, after, trace);
      right += 1;
      grown = true;
    }
  }
  const others = blocks.filter(
    (block, index) => (index < left || index > right) && block.dischargedAh > whole.dischargedAh / 2,
  );
  const { startS, endS } = edgesOf(trace, whole.first, whole.last);
  return {
    startS,
    endS,
    firstIndex: whole.first,
    lastIndex: whole.last,
    legs: whole.legs,
    longestPauseS: whole.longestPauseS,
    chargedOutsideAh: chargedOutside(trace, startS, endS),
    others: others.length,
  };
}

/** A pause shorter than this, s, parts no legs: a load may switch. */
const legPauseS = (trace: Trace) => Math.max(60, 3 * trace.stepS);

const runsOf = (trace: Trace): Run[] => {
  const { timeS, currentA, idleA } = trace;
  const runs: Run[] = [];
  let run: Run | undefined;
  let isOpen = false;
  for (let index = 0; index < currentA.length; index += 1) {
    const amps = currentA[index] ?? 0;
    if (amps > idleA) {
      if (!isOpen) {
        run = { first: index, last: index, dischargedAh: 0, legs: 1, longestPauseS: 0, chargedAfterAh: 0 };
        runs.push(run);
      }
      if (run) run.last = index;
    }
    isOpen = amps > idleA;
    const seconds = (timeS[index + 1] ?? NaN) - (timeS[index] ?? 0);
    if (!run || !(seconds > 0)) continue;
    const next = currentA[index + 1] ?? 0;
    run.dischargedAh += positivePart(amps, next, seconds) / 3600;
    run.chargedAfterAh += positivePart(-amps, -next, seconds) / 3600;
  }
  return runs;
};

const joined = (one: Run, other: Run, trace: Trace): Run => {
  const pauseS = (trace.timeS[other.first] ?? 0) - (trace.timeS[one.last] ?? 0);
  return {
    first: one.first,
    last: other.last,
    dischargedAh: one.dischargedAh + other.dischargedAh,
    legs: one.legs + other.legs - (pauseS > legPauseS(trace) ? 0 : 1),
    longestPauseS: Math.max(one.longestPauseS, other.longestPauseS, pauseS),
    chargedAfterAh: other.chargedAfterAh,
  };
};

/** Joins neighbours that hardly any charging parts, so that a pulsed load is one block. */
const joinRuns = (runs: Run[], trace: Trace): Run[] => {
  const blocks: Run[] = [];
  for (const run of runs) {
    const previous = blocks.at(-1);
    if (previous && previous.chargedAfterAh <= endingShare * previous.dischargedAh) {
      blocks[blocks.length - 1] = joined(previous, run, trace);
    } else blocks.push(run);
  }
  return blocks;
};

/** The window reaches to the row before and behind the load where these are near, and to zero where they charge. */
const edgesOf = ({ timeS, currentA, stepS }: Trace, first: number, last: number) => {
  const near = Math.max(60, 3 * stepS);
  const edge = (index: number, beside: number): number => {
    const [atS, besideS] = [timeS[index] ?? 0, timeS[beside]];
    const [amps, besideA] = [currentA[index] ?? 0, currentA[beside] ?? 0];
    if (besideS === undefined || Math.abs(besideS - atS) > near) return atS;
    return besideA >= 0 ? besideS : atS + ((besideS - atS) * amps) / (amps - besideA);
  };
  return { startS: edge(first, first - 1), endS: edge(last, last + 1) };
};

const chargedOutside = ({ timeS, currentA }: Trace, startS: number, endS: number): number => {
  let charged = 0;
  for (let index = 0; index + 1 < timeS.length; index += 1) {
    const [fromS, toS] = [timeS[index] ?? 0, timeS[index + 1] ?? 0];
    if (fromS >= startS && toS <= endS) continue;
    charged += positivePart(-(currentA[index] ?? 0), -(currentA[index + 1] ?? 0), toS - fromS) / 3600;
  }
  return charged;
};
