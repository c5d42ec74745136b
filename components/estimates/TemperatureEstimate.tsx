import { useState } from 'react';

import { climateBandWords, optionsOf, placeWords } from '@/components/banks/bankWords';
import { SelectField } from '@/components/ui';
import { type ClimateBand, type Standing, usualCellTemperatureC, usualTemperatureOffK } from '@/lib/measure';
import { formatQuantity } from '@/lib/units';

import { Estimate } from './Estimate';

export interface TemperatureEstimateProps {
  /** As the bank says it; asked for where it does not. */
  climateBand: ClimateBand | null;
  place: Standing | null;
  /** Takes the mean cell temperature in °C, as text. */
  onUse: (temperatureC: string) => void;
}

/** Mean cell temperature over the year from the climate and where the bank stands. */
export function TemperatureEstimate({ climateBand, place, onUse }: TemperatureEstimateProps) {
  const [band, setBand] = useState<ClimateBand | ''>(climateBand ?? '');
  const [standing, setStanding] = useState<Standing | ''>(place ?? '');
  const mean = band === '' || standing === '' ? undefined : usualCellTemperatureC(band, standing);
  return (
    <Estimate
      label="Estimate it from climate and place"
      lines={[
        'read from a table by climate and place',
        ...(mean === undefined || band === '' || standing === ''
          ? []
          : [`${climateBandWords[band]}; ${placeWords[standing]}: ${formatQuantity(mean, '°C')}`]),
      ]}
      caveat={`Of the cells, which stand some 4 K above the outdoor mean by their own heat and by shelter. Common practice, no source; it may be ${usualTemperatureOffK} K off.`}
      result={mean === undefined ? undefined : formatQuantity(mean, '°C')}
      onUse={() => mean !== undefined && onUse(String(mean))}
    >
      <SelectField label="Climate" value={band} onChange={setBand} options={optionsOf(climateBandWords)} />
      <SelectField
        label="Where it stands"
        value={standing}
        onChange={setStanding}
        options={optionsOf(placeWords)}
      />
    </Estimate>
  );
}
