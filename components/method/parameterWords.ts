const words: Record<string, string> = {
  c0: 'c₀, start over rating, ln',
  lnA: 'ln a, calendar fade after a year at 25 °C',
  aT: 'aT, heat on calendar fade, kJ/mol',
  aS: 'aS, charge level on calendar fade',
  lnB: 'ln b, cycling fade after 500 full cycles',
  z: 'z, exponent of full cycles',
  bD: 'bD, exponent of depth',
  bC: 'bC, exponent of rate',
  bT: 'bT, heat on cycling fade, kJ/mol',
  bK: 'bK, clamping on cycling fade',
  ln_s: 'ln of the spread of checks',
  ln_sc: 'ln of the spread of starts',
  ln_su: 'ln of the spread of banks’ pace',
  ln_sm: 'ln of the spread of cell types’ pace',
};

/** A parameter's sign with what it stands for. */
export const parameterWords = (name: string): string => words[name] ?? name;
