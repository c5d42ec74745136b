import { createDraws } from '../random';

/** A test to be simulated, of a whole bank. */
export interface TestPlan {
  /** First row of the log, UTC. */
  startsAt: string;
  series: number;
  ratedAh: number;
  /** What the bank holds in this test, Ah. */
  capacityAh: number;
  dischargeIt: number;
  chargeV: number;
  cutOffCellV: number;
  roomC: number;
  /** A stop of the load in the middle: begins when this share of the charge is out. */
  pause?: { atFraction: number; seconds: number };
  /** Depth of the slow swing of the load. */
  swingFraction: number;
  seed: number;
}

/** One second of the test; current positive while discharging. */
export interface Moment {
  timeS: number;
  currentA: number;
  voltageV: number;
  temperatureC: number;
  lowestCellV: number;
  highestCellV: number;
}

/** The discharge as it truly was, integrated second by second. */
export interface DischargeTruth {
  capacityAh: number;
  energyWh: number;
  /** From the load's start to its end, pauses included. */
  durationS: number;
  startTemperatureC: number;
  endTemperatureC: number;
  lowestCellAtEndV: number;
}

const chargeS = 1500;
const restS = 1800;
const rampS = 180;
const afterS = 900;

/** Voltage of a LFP cell at rest by its state of charge: flat, with a knee at either end. Our own shape. */
export function restVoltage(soc: number): number {
  const bottom = 0.75 * Math.exp(-soc / 0.022) + 0.12 * Math.exp(-soc / 0.09);
  return 3.285 + 0.05 * (soc - 0.5) - bottom + 0.11 * Math.exp(-(1 - soc) / 0.012);
}

/**
 * Simulates the end of a charge, a rest, the discharge down to the lowest cell's cut-off and a while after, second by
 * second.
 */
export function simulateDischarge(plan: TestPlan): { moments: Moment[]; truth: DischargeTruth } {
  const draws = createDraws(plan.seed, 9);
  const cells = Array.from({ length: plan.series }, () => ({
    // The knee leaves about one hundredth in the cell.
    ahFull: (plan.capacityAh / 0.988) * (1 + draws.normal(0, 0.004)),
    soc: 1 - Math.abs(draws.normal(0, 0.001)),
    ohm: (0.29 / plan.ratedAh) * (1 + draws.normal(0, 0.06)),
  }));
  const moments: Moment[] = [...chargeAndRest(plan)];
  const sums = { ampSeconds: 0, wattSeconds: 0 };
  let temperatureC = plan.roomC;
  let pausedS = 0;
  const startTemperatureC = temperatureC;
  const fullA = plan.ratedAh * plan.dischargeIt;
  for (let second = 0; ; second++) {
    const out = sums.ampSeconds / 3600 / plan.capacityAh;
    const isPaused = plan.pause !== undefined && out >= plan.pause.atFraction && pausedS < plan.pause.seconds;
    if (isPaused) pausedS += 1;
    const swing = 1 + plan.swingFraction * Math.sin((2 * Math.PI * second) / 5400);
    const currentA = isPaused ? 0 : fullA * swing * Math.min(1, (second + 1) / rampS);
    const volts = cells.map((cell) => {
      cell.soc -= currentA / 3600 / cell.ahFull;
      return restVoltage(cell.soc) - currentA * cell.ohm;
    });
    const voltageV = volts.reduce((sum, volt) => sum + volt, 0);
    const warmTo = plan.roomC + 16 * (currentA / plan.ratedAh);
    temperatureC += (warmTo - temperatureC) / 9000;
    sums.ampSeconds += currentA;
    sums.wattSeconds += currentA * voltageV;
    const [lowestCellV, highestCellV] = [Math.min(...volts), Math.max(...volts)];
    const timeS = chargeS + restS + second;
    moments.push({ timeS, currentA, voltageV, temperatureC, lowestCellV, highestCellV });
    if (lowestCellV > plan.cutOffCellV) continue;
    moments.push(...afterwards(moments[moments.length - 1]!, plan, cells));
    return {
      moments,
      truth: {
        capacityAh: sums.ampSeconds / 3600,
        energyWh: sums.wattSeconds / 3600,
        durationS: second + 1,
        ...{ startTemperatureC, endTemperatureC: temperatureC, lowestCellAtEndV: lowestCellV },
      },
    };
  }
}

/** Held at the maker's voltage while the current tails off, then at rest. */
function chargeAndRest(plan: TestPlan): Moment[] {
  return Array.from({ length: chargeS + restS }, (_, timeS) => {
    const restedS = Math.max(0, timeS - chargeS);
    const isCharging = timeS < chargeS;
    const currentA = isCharging ? -plan.ratedAh * (0.03 + 0.17 * Math.exp(-timeS / 400)) : 0;
    const settled = restVoltage(0.999);
    const cellV = isCharging ? plan.chargeV : settled + (plan.chargeV - settled) * Math.exp(-restedS / 500);
    return {
      ...{ timeS, currentA, voltageV: cellV * plan.series, temperatureC: plan.roomC },
      ...{ lowestCellV: cellV - 0.009, highestCellV: cellV + 0.012 },
    };
  });
}

/** The load is off: the cells recover. */
function afterwards(last: Moment, plan: TestPlan, cells: readonly { soc: number }[]): Moment[] {
  const rest = cells.map(({ soc }) => restVoltage(soc) + 0.12);
  const goal = rest.reduce((sum, volt) => sum + volt, 0);
  return Array.from({ length: afterS }, (_, second) => {
    const share = 1 - Math.exp(-(second + 1) / 240);
    const towards = (from: number, to: number) => from + (to - from) * share;
    return {
      timeS: last.timeS + 1 + second,
      currentA: 0,
      voltageV: towards(last.voltageV, goal),
      temperatureC: last.temperatureC - (last.temperatureC - plan.roomC) * (second / 9000),
      lowestCellV: towards(last.lowestCellV, Math.min(...rest)),
      highestCellV: towards(last.highestCellV, Math.max(...rest)),
    };
  });
}
