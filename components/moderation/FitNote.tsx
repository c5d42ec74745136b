import { useQuery } from '@tanstack/react-query';

import { Quiet } from '@/components/ui';
import { fitListQuery } from '@/lib/client/fits';
import { formatCount, formatInstant } from '@/lib/units';

/** Where the working fit stands; silent until it is known. */
export function FitNote() {
  const { data } = useQuery(fitListQuery());
  const current = data?.fits.find(({ kind, isCurrent }) => kind === 'working' && isCurrent);
  if (!data || !current) return null;
  const { checks, banks } = current.evidence;
  const running = data.isRefitRunning ? ' A refit is under way.' : '';
  return (
    <Quiet aria-live="polite">
      {`Working fit of ${formatInstant(current.fittedAt)}: ${formatCount(checks)} checks on ${formatCount(banks)} banks.${running}`}
    </Quiet>
  );
}
