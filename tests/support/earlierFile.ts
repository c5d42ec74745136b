import { earlierColumns, headersOf } from '@/lib/contract/earlierColumns';

/**
 * Cells of an earlier check of a bank of 280 Ah that nothing is wrong with: 264 Ah at 56 A, 25 °C, 3.2 V a cell on
 * average over 16 cells in series, so that 264 Ah x 16 x 3.2 V = 13.5168 kWh and 264/56 h = 4.714 h.
 */
export const goodRow: Record<string, string> = {
  tested_on: '2025-10-04',
  bank: 'Barn',
  method: 'discharge',
  instrument: 'Shunt of 500 A',
  gain_error_percent: '0.5',
  reading_noise_percent: '0.2',
  capacity_ah: '264',
  energy_kwh: '13.5168',
  mean_current_a: '56',
  duration_h: '4:43',
  temperature_start_c: '25',
  temperature_end_c: '25',
  full_charge_ended_by: 'voltage_and_tail',
  rest_min: '60',
  discharge_ended_by: 'lowest_cell',
  lowest_cell_at_full_v: '3.44',
  highest_cell_at_full_v: '3.46',
  lowest_cell_at_end_v: '2.6',
  highest_cell_at_end_v: '2.8',
  depth_percent: '60',
  use_mean_it: '0.1',
  temperature_mean_c: '22',
  soc_mean_percent: '55',
  counter_efc: '560',
};

export type RowChange = Record<string, string>;

/** A file with these rows, each the good one with something changed. */
export function earlierFile(rows: readonly RowChange[], delimiter = ','): string {
  const names = [...new Set(rows.flatMap((row) => Object.keys({ ...goodRow, ...row })))];
  const quoted = (cell: string) => (/[",;\t\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);
  const line = (cells: string[]) => cells.map(quoted).join(delimiter);
  const body = rows.map((row) => {
    const cells = { ...goodRow, ...row };
    return line(names.map((name) => cells[name] ?? ''));
  });
  return [line(names), ...body, ''].join('\r\n');
}

/** Every name a column may have. */
export const everyHeader = earlierColumns.flatMap(headersOf);
