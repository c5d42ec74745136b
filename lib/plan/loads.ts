/** One thing that runs at night. */
export interface Load {
  name: string;
  watts: number;
  hours: number;
}

/** Energy of a list of loads over a night, Wh. */
export function energyOfLoads(loads: readonly Load[]): number {
  return loads.reduce((sum, { watts, hours }) => sum + watts * hours, 0);
}
