interface DischargeLogOptions {
  /** Name of one more column, whose cells are empty of meaning. */
  extraHeader?: string;
  timeHeader?: string;
  stamps?: 'seconds' | 'ambiguousDate';
  /** Between rows; a small one makes a long log. */
  stepS?: number;
}

/**
 * A log of a discharge at a constant 56 A for 4.7 h at 25 °C, one row every 20 s (847 under load), idle before and
 * after. By the trapezoid rule the steps into and out of the load count half, so that its charge is that of 847 steps
 * spread over 848.
 */
export function dischargeLog(options: DischargeLogOptions = {}): { text: string; capacityAh: number } {
  const { extraHeader, timeHeader = 'time (s)', stamps = 'seconds', stepS = 20 } = options;
  const [idleRows, loadRows] = [Math.round(600 / stepS), Math.round(16_940 / stepS)];
  const extra = extraHeader === undefined ? '' : `,"${extraHeader.replaceAll('"', '""')}"`;
  const lines = [`${timeHeader},voltage (V),current (A),temperature (°C)${extra}`];
  const rows = idleRows + loadRows + idleRows;
  for (let row = 0; row < rows; row += 1) {
    const isLoaded = row >= idleRows && row < idleRows + loadRows;
    const share = Math.min(1, Math.max(0, (row - idleRows) / loadRows));
    const volts = isLoaded ? 52.8 - 8 * share ** 3 : row < idleRows ? 54 : 48;
    const seconds = Number((row * stepS).toFixed(3));
    const stamp = stamps === 'seconds' ? String(seconds) : dateStamp(seconds);
    const cells = [stamp, volts.toFixed(3), isLoaded ? '-56' : '0', '25.0'];
    lines.push(cells.join(',') + (extra && ',x'));
  }
  return { text: `${lines.join('\n')}\n`, capacityAh: (56 * loadRows * stepS) / 3600 };
}

/** Day and month of a day that could be either. */
function dateStamp(seconds: number): string {
  const clock = new Date(seconds * 1000).toISOString().slice(11, 19);
  return `03/04/2026 ${clock}`;
}
