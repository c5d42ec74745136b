import type { Submission } from '@/lib/contract/moderation';

interface QuestionTemplate {
  key: string;
  label: string;
  /** Findings that bring it to the top of the list. */
  rules: readonly string[];
  text: string;
}

/** Questions that come up again and again; a moderator changes the words before they are sent. */
const questionTemplates: readonly QuestionTemplate[] = [
  {
    key: 'scale',
    label: 'Cell, bank or energy',
    rules: [
      'cellForBank',
      'parallelTwice',
      'seriesAddedUp',
      'whForAh',
      'kWhForAh',
      'mAhForAh',
      'ratedCapacity',
    ],
    text: 'The charge does not go with the rated capacity of your bank. Please look at the meter again: is it the charge of the whole bank, in Ah?',
  },
  {
    key: 'layout',
    label: 'Cells in parallel and series',
    rules: ['layoutSwapped', 'meanVoltage', 'energyUnit'],
    text: 'Charge and energy together give a cell voltage that no such cell has. Please check how many cells are in parallel and how many in series, and the unit of the energy.',
  },
  {
    key: 'failed',
    label: 'Did something fail?',
    rules: ['capacityDrop', 'poolResidual', 'cellSpread'],
    text: 'The capacity lies well below what your bank showed before. Did a cell fail or swell, or was the bank not full at the start? A failure counts as much as a good year: please add it as an event. A swollen cell means stop, and is never pressed flat.',
  },
  {
    key: 'rise',
    label: 'Why did it rise?',
    rules: ['capacityRise'],
    text: 'The capacity is higher than last time by more than the uncertainty of the two tests. Was the bank rebalanced, a cell replaced, or another meter used? If so, please add the event.',
  },
  {
    key: 'counter',
    label: 'Counter or depth',
    rules: [
      'counterBackwards',
      'counterCalendar',
      'counterRate',
      'counterUnit',
      'counterStill',
      'typicalCycles',
      'counterDepth',
    ],
    text: 'The counter does not go with the time in use and the depth you gave. Please check its unit, and whether it was reset or replaced.',
  },
  {
    key: 'complete',
    label: 'Full at the start, empty at the end',
    rules: ['fullCharge', 'cutoffReached', 'endedByBms'],
    text: "How was the charge ended before the test, and what ended the discharge? A check goes from the maker's charge voltage and tail current down to the maker's lower voltage, never beyond.",
  },
  {
    key: 'sameTest',
    label: 'The same test twice',
    rules: ['duplicate', 'sameLog', 'sameCurve'],
    text: 'This looks like a test that was sent before. Was the wrong file or date chosen? If it is the same test, please withdraw one of the two.',
  },
];

/** The templates, those for what was found first. */
export function templatesFor({ findings }: Pick<Submission, 'findings'>): QuestionTemplate[] {
  const found = new Set(findings.filter(({ severity }) => severity !== 'fits').map(({ rule }) => rule));
  const isMeant = ({ rules }: QuestionTemplate) => rules.some((rule) => found.has(rule));
  return [...questionTemplates.filter(isMeant), ...questionTemplates.filter((one) => !isMeant(one))];
}
