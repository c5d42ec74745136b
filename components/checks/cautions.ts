/** What stands wherever a person is told to work on a bank. */
export const cautions: readonly { title: string; points: readonly string[] }[] = [
  {
    title: 'Before you touch anything',
    points: [
      "The makers' instructions and local codes come first, before anything said here.",
      'A bank drives very high currents into a short circuit. Insulated tools, no jewellery, eye protection.',
      'A fuse and a disconnect rated for DC, at the bank.',
      'Above the local limit of extra-low voltage, and for all mains wiring, get licensed help.',
      'A swollen cell means stop. It is never pressed flat, and cells are never over-compressed.',
      'Banks and cells are brought to equal voltage before they are put in parallel.',
    ],
  },
  {
    title: 'While charging',
    points: [
      "Never outside the maker's limits of voltage, current and temperature; no charging below 0 °C at the cells.",
      "The charge ends by the maker's voltage and tail current, not by pushing the bank to its top.",
    ],
  },
  {
    title: 'During the test',
    points: [
      'Stay with it from beginning to end.',
      "You stop the load before the BMS has to. The BMS trip is the last protection, not the test's end.",
      'Stop at once on any cell out of its limits, or warm.',
      'Recharge at once afterwards.',
    ],
  },
];

/** Said with every life and every share of capacity. */
export const conventionSentence = '80 % is a convention for the end of life, not a safety statement.';
