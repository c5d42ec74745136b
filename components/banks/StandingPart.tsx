import { conventionSentence } from '@/components/checks/cautions';
import { Banner, Heading, Lead, Quiet, Readout, Readouts, Stack, Text } from '@/components/ui';
import type { Forecast, Standing } from '@/lib/contract/standing';

import {
  absenceSentence,
  calendarSentence,
  forecastAge,
  forecastFigure,
  forecastTold,
  noteSentence,
  paceSentence,
  standingSentence,
  usedWords,
} from './standingWords';

type Told = Pick<
  Standing,
  'state' | 'outside' | 'notes' | 'pace' | 'basis' | 'checksUsed' | 'use' | 'forecast'
>;

/** Where a bank stands among banks used like it, and when it comes down to 80 %. */
export function StandingPart({ standing }: { standing: Told }) {
  const { pace, forecast, use, basis, notes } = standing;
  const absence = absenceSentence(standing);
  const sentence = standingSentence(standing);
  return (
    <Stack gap="m">
      <Heading>Among banks used like it</Heading>
      {sentence && <Lead tone="ink">{sentence}</Lead>}
      {pace && <Text>{paceSentence(pace)}</Text>}
      {absence && <Text>{absence}</Text>}
      {use && <Quiet>{`Used so since new: ${usedWords(use)}.`}</Quiet>}
      {basis === 'pool' && (
        <Quiet>
          Fewer than 10 banks or 5 owners stand behind its cell type, so it is compared with banks of any cell
          type, whose range is wider.
        </Quiet>
      )}
      {notes.map((note) => (
        <Banner key={note} kind="info" title={noteTitles[note]}>
          {noteSentence(note)}
        </Banner>
      ))}
      {forecast && <ForecastPart forecast={forecast} />}
    </Stack>
  );
}

const noteTitles: Record<Standing['notes'][number], string> = {
  boughtUsed: 'Left out of pooled lives',
  boughtUnknown: 'Left out of pooled lives',
  clampingUnclear: 'Left out of the pooled fit',
  checksSetAside: 'A check is set aside',
};

function ForecastPart({ forecast }: { forecast: Forecast }) {
  const { value, words } = forecastFigure(forecast);
  const tells = forecastTold(forecast);
  const age = forecastAge(forecast);
  return (
    <Stack gap="m">
      <Heading>When it reaches 80 %</Heading>
      <Readouts>
        <Readout value={value} unit="" tone={tells === 'year' ? 'tide' : 'ink'}>
          {words}
        </Readout>
        {tells === 'year' && (
          <Readout value={age.value} unit="y">
            {age.words}
          </Readout>
        )}
      </Readouts>
      {tells !== 'notMeasured' && tells !== 'beyond' && <Text>{calendarSentence(forecast)}</Text>}
      <Quiet>
        {`If it goes on as it was used to date. ${forecast.support === 'leans' ? 'Leans on published studies. ' : ''}${conventionSentence}`}
      </Quiet>
    </Stack>
  );
}
