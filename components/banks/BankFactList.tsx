import { type Definition, DefinitionList, Heading, Stack } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import { formatMoney, formatMonth, formatQuantity } from '@/lib/units';

import { boughtWords, clampingWords, climateBandWords, layoutLine, placeWords } from './bankWords';

const quantity = (label: string, value: number | null, unit: string, decimals?: number): Definition[] =>
  value === null ? [] : [{ label, value: formatQuantity(value, unit, { decimals }) }];

const words = (label: string, value: string | null): Definition[] =>
  value === null ? [] : [{ label, value }];

/** What is known of a bank; what was not given is left out. */
export function BankFactList({ bank }: { bank: Bank }) {
  const { cellType, priceMinor, priceCurrency, priceMonth } = bank;
  const hasPrice = priceMinor !== null && priceCurrency !== null;
  const items: Definition[] = [
    { label: 'Cell type', value: `${cellType.maker} ${cellType.name}` },
    { label: 'Layout', value: layoutLine(bank) },
    { label: 'Rated', value: formatQuantity(bank.ratedAh, 'Ah') },
    { label: 'Nominal', value: formatQuantity(cellType.nominalV * bank.series, 'V', { decimals: 1 }) },
    { label: 'First use', value: formatMonth(bank.firstUseMonth) },
    ...words('Made', bank.madeMonth && formatMonth(bank.madeMonth)),
    { label: 'Bought', value: boughtWords[bank.bought] },
    ...quantity('At the start', bank.startCapacityAh, 'Ah'),
    { label: 'Held by', value: clampingWords[bank.clamping] },
    ...quantity('Clamping force', bank.clampForceN, 'N', 0),
    ...quantity('Torque', bank.clampTorqueNm, 'N·m'),
    ...quantity('Gap between cells', bank.spacingMm, 'mm'),
    ...words('Place', bank.place && placeWords[bank.place]),
    ...words('Climate', bank.climateBand && climateBandWords[bank.climateBand]),
    ...quantity('Charge limit', bank.chargeLimitV, 'V'),
    ...quantity('Discharge limit', bank.dischargeLimitV, 'V'),
    ...quantity('BMS high trip', bank.bmsHighTripV, 'V'),
    ...quantity('BMS low trip', bank.bmsLowTripV, 'V'),
    ...(hasPrice
      ? [
          {
            label: 'One cell cost',
            value: [formatMoney(priceMinor, priceCurrency), priceMonth && formatMonth(priceMonth)]
              .filter(Boolean)
              .join(', '),
          },
        ]
      : []),
  ];
  return (
    <Stack gap="m">
      <Heading>The bank</Heading>
      <DefinitionList items={items} />
    </Stack>
  );
}
