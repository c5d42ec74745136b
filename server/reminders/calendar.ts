import { formatDate } from '@/lib/units';
import { calendarFile } from '@/lib/units/calendarFile';

import type { Deps } from '../deps';
import { linkBase } from '../mail/linkBase';
import type { RemindedBank } from './queries';

const alarmHour = 9;

/** The day a bank's check is due as a calendar entry that rings at nine in the morning. */
export function dueCalendarFile({ config, clock }: Deps, { bank, lastTestedOn }: RemindedBank, day: string) {
  const url = `${linkBase(config.publicUrl)}/banks/${bank.id}`;
  const last = lastTestedOn ? `The last check was on ${formatDate(lastTestedOn)}. ` : '';
  return calendarFile(
    {
      uid: `check-of-${bank.id}@ebbline.invalid`,
      title: `Capacity check: ${bank.name}`,
      description: `${last}Preparation and cautions stand at the start of the check: ${url}/check`,
      url,
      at: { day, alarmHour },
    },
    clock(),
  );
}
