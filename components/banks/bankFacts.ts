import type { Definition } from '@/components/ui';
import type { BankFields, CellTypeBrief } from '@/lib/contract/banks';
import type { FieldSource } from '@/lib/contract/fields';
import { formatMoney, formatMonth, formatQuantity } from '@/lib/units';

import { boughtWords, clampingWords, climateBandWords, layoutLine, placeWords } from './bankWords';

/** What is said of a bank, stored already or not. */
export type BankFacts = BankFields & { cellType: CellTypeBrief };

const sourceWords: Record<FieldSource, string> = {
  metered: 'metered',
  readOff: 'read off the BMS',
  estimated: 'estimated',
};

const words = (label: string, value: string | null): Definition[] =>
  value === null ? [] : [{ label, value }];

function quantity(
  label: string,
  { sources, ...bank }: BankFacts,
  field: keyof BankFacts['sources'] & keyof BankFields,
  unit: string,
  decimals?: number,
): Definition[] {
  const value = bank[field];
  const source = sources[field];
  if (value === null) return [];
  const figure = formatQuantity(value, unit, { decimals });
  return [{ label, value: source ? `${figure}, ${sourceWords[source]}` : figure }];
}

const cells = ({ cellType, madeMonth }: BankFacts): Definition[] => [
  { label: 'Cell type', value: `${cellType.maker} ${cellType.name}` },
  ...words('Made', madeMonth && formatMonth(madeMonth)),
];

const layout = ({ cellType, ...bank }: BankFacts): Definition[] => [
  { label: 'Layout', value: layoutLine(bank) },
  { label: 'Rated', value: formatQuantity(cellType.ratedAh * bank.parallel, 'Ah') },
  { label: 'Nominal', value: formatQuantity(cellType.nominalV * bank.series, 'V', { decimals: 1 }) },
  { label: 'First use', value: formatMonth(bank.firstUseMonth) },
];

const clamping = (bank: BankFacts): Definition[] => [
  { label: 'Held by', value: clampingWords[bank.clamping] },
  ...quantity('Torque', bank, 'clampTorqueNm', 'N·m'),
  ...quantity('Clamping force', bank, 'clampForceN', 'N', 0),
  ...quantity('Gap between cells', bank, 'spacingMm', 'mm'),
];

const use = (bank: BankFacts): Definition[] => [
  ...words('Place', bank.place && placeWords[bank.place]),
  ...words('Climate', bank.climateBand && climateBandWords[bank.climateBand]),
  ...quantity('Charge limit', bank, 'chargeLimitV', 'V'),
  ...quantity('Discharge limit', bank, 'dischargeLimitV', 'V'),
  ...quantity('BMS high trip', bank, 'bmsHighTripV', 'V'),
  ...quantity('BMS low trip', bank, 'bmsLowTripV', 'V'),
];

const start = (bank: BankFacts): Definition[] => {
  const { priceMinor, priceCurrency, priceMonth } = bank;
  const price = priceMinor === null || priceCurrency === null ? null : formatMoney(priceMinor, priceCurrency);
  return [
    { label: 'Bought', value: boughtWords[bank.bought] },
    ...quantity('At the start', bank, 'startCapacityAh', 'Ah'),
    ...words(
      'One cell cost',
      price && [price, priceMonth && formatMonth(priceMonth)].filter(Boolean).join(', '),
    ),
  ];
};

/** What is known of a bank by the step it is asked in; what was not given is left out. */
export const factGroups: readonly ((bank: BankFacts) => Definition[])[] = [
  cells,
  (bank) => [{ label: 'Name', value: bank.name }, ...layout(bank)],
  clamping,
  use,
  start,
];

/** The same in one list, without the name, for a page that it heads. */
export const factsOf = (bank: BankFacts): Definition[] =>
  [cells, layout, clamping, use, start].flatMap((group) => group(bank));
