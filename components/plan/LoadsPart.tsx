import { useState } from 'react';

import { Button, Disclosure, NumberField, Row, Stack, Text, TextField } from '@/components/ui';
import { energyOfLoads } from '@/lib/plan';
import { formatQuantity, parseNumber } from '@/lib/units';

interface TypedLoad {
  name: string;
  watts: string;
  hours: string;
}

const emptyLoad: TypedLoad = { name: '', watts: '', hours: '' };
// Round figures to begin with; every household's own differ.
const firstLoads: TypedLoad[] = [
  { name: 'Fridge', watts: '45', hours: '12' },
  { name: 'Lights', watts: '40', hours: '5' },
  { name: 'Cooking', watts: '1500', hours: '0.7' },
];
const mostLoads = 12;

/** Adds a list of loads up to the night's energy. */
export function LoadsPart({ onUse }: { onUse: (kwh: string) => void }) {
  const [loads, setLoads] = useState(firstLoads);
  const read = loads.map(({ name, watts, hours }) => ({
    name,
    watts: Math.max(parseNumber(watts) ?? 0, 0),
    hours: Math.min(Math.max(parseNumber(hours) ?? 0, 0), 24),
  }));
  const energyWh = energyOfLoads(read);
  const change = (place: number, part: Partial<TypedLoad>) =>
    setLoads(loads.map((load, index) => (index === place ? { ...load, ...part } : load)));
  return (
    <Disclosure label="Add it up from a list of loads">
      <Stack gap="m">
        {loads.map((load, place) => (
          <Stack key={place} gap="s">
            <TextField
              label={`Load ${place + 1}`}
              value={load.name}
              onChange={(name) => change(place, { name })}
              optional
            />
            <Row gap="m" align="flex-start">
              <NumberField
                label={`Draw of ${load.name || `load ${place + 1}`}`}
                unit="W"
                value={load.watts}
                onChange={(watts) => change(place, { watts })}
                error={problemOf(load.watts)}
              />
              <NumberField
                label={`Hours of ${load.name || `load ${place + 1}`}`}
                unit="h a night"
                value={load.hours}
                onChange={(hours) => change(place, { hours })}
                error={problemOf(load.hours, 24)}
              />
            </Row>
          </Stack>
        ))}
        <Row>
          <Button
            label="Add a load"
            kind="quiet"
            disabled={loads.length >= mostLoads}
            onPress={() => setLoads([...loads, emptyLoad])}
          />
          {loads.length > 1 && (
            <Button label="Remove the last" kind="quiet" onPress={() => setLoads(loads.slice(0, -1))} />
          )}
        </Row>
        <Text>{`Together ${formatQuantity(energyWh / 1000, 'kWh', { decimals: 2 })} a night.`}</Text>
        <Button
          label="Use this sum"
          disabled={energyWh <= 0}
          onPress={() => onUse(String(Number((energyWh / 1000).toFixed(2))))}
        />
      </Stack>
    </Disclosure>
  );
}

function problemOf(text: string, most?: number): string | undefined {
  if (text.trim() === '') return undefined;
  const value = parseNumber(text);
  if (value === undefined) return 'Enter a number.';
  if (value < 0) return 'At least 0.';
  return most !== undefined && value > most ? `At most ${most}.` : undefined;
}
