import { cellTypes } from './cellTypes';
import { createDraws, type Draws } from './random';
import type { PendingKind, DemoOwner } from './types';

/** How many owners have one, two, three and four banks: 900 owners, 1,200 banks. */
const ownersByBanks = [
  { banks: 1, owners: 655 },
  { banks: 2, owners: 200 },
  { banks: 3, owners: 35 },
  { banks: 4, owners: 10 },
];

/** A bank that is to be there in a certain shape: those of the demo's accounts, and those behind the queue. */
export interface PlannedBank {
  owner: number;
  cellTypeId: string;
  name?: string;
  parallel: number;
  series: number;
  firstUseMonth: string;
  /** Days of its checks; the last one is pending when `pending` is set. */
  testedOn: string[];
  isClamped?: boolean;
  pending?: PendingKind;
  /** Asked of the owner about the last check, which was sent back with it. */
  question?: string;
}

const yearly = (from: number, to: number, monthAndDay: string) =>
  Array.from({ length: to - from + 1 }, (_, year) => `${from + year}-${monthAndDay}`);

/** Owners 0 to 4 are the demo's accounts; their Novembers are free for the logs in ./logs. */
const accountBanks: PlannedBank[] = [
  {
    ...{ owner: 0, cellTypeId: 'skerry-240', name: 'House bank', parallel: 2, series: 16 },
    ...{ firstUseMonth: '2020-10', testedOn: yearly(2021, 2025, '11-06'), isClamped: true },
  },
  {
    ...{ owner: 0, cellTypeId: 'tarnholt-100', name: 'Workshop', parallel: 3, series: 8 },
    ...{ firstUseMonth: '2021-09', testedOn: yearly(2022, 2025, '10-14'), isClamped: false },
  },
  {
    ...{ owner: 1, cellTypeId: 'corrie-c272', name: 'Barn', parallel: 1, series: 16 },
    ...{ firstUseMonth: '2019-06', testedOn: yearly(2020, 2025, '09-20'), isClamped: true },
  },
  {
    ...{ owner: 2, cellTypeId: 'skerry-240', name: 'Boathouse', parallel: 1, series: 16 },
    ...{ firstUseMonth: '2022-03', testedOn: yearly(2023, 2026, '04-11'), isClamped: false },
  },
  {
    ...{ owner: 3, cellTypeId: 'marram-lx', name: 'Garage', parallel: 1, series: 16 },
    ...{ firstUseMonth: '2021-10', testedOn: yearly(2022, 2026, '11-18'), isClamped: true },
    question: 'How long did the bank rest after the charge, and did every cell reach the voltage you set?',
  },
  {
    ...{ owner: 4, cellTypeId: 'sallow-105', name: 'Attic', parallel: 2, series: 16 },
    ...{ firstUseMonth: '2020-02', testedOn: yearly(2021, 2026, '03-02'), isClamped: false },
  },
];

type Waiting = [
  PendingKind,
  cellTypeId: string,
  parallel: number,
  firstUseMonth: string,
  checks: number,
  day: string,
];

/** The queue: nine mistakes and oddities, and five clean checks of one cell type, each of another owner. */
const waiting: Waiting[] = [
  ['bankForCell', 'skerry-240', 2, '2022-10', 4, '11-02'],
  ['cellsAdded', 'tarnholt-280', 1, '2021-11', 5, '11-14'],
  ['wattHours', 'marram-310', 1, '2023-10', 3, '11-08'],
  ['wrongRating', 'shingle-250', 1, '2025-09', 1, '11-16'],
  ['coldAndCutShort', 'corrie-c272', 1, '2020-11', 6, '11-22'],
  ['duplicate', 'skerry-320', 1, '2021-10', 5, '11-12'],
  ['counterBackwards', 'sallow-300', 1, '2022-11', 4, '11-18'],
  ['riseAfterRebalance', 'tarnholt-200', 2, '2019-10', 7, '11-10'],
  ['realFailure', 'sallow-210', 1, '2020-10', 6, '11-04'],
  ['clean', 'skerry-240', 1, '2021-10', 5, '11-20'],
  ['clean', 'skerry-240', 2, '2019-11', 7, '11-15'],
  ['clean', 'skerry-240', 1, '2023-11', 3, '11-21'],
  ['clean', 'skerry-240', 1, '2022-10', 4, '11-23'],
  ['clean', 'skerry-240', 2, '2020-11', 6, '11-24'],
];

const firstWaitingOwner = 5;

export const plannedBanks: readonly PlannedBank[] = [
  ...accountBanks,
  ...waiting.map(([pending, cellTypeId, parallel, firstUseMonth, checks, day], place) => ({
    ...{ owner: firstWaitingOwner + place, cellTypeId, parallel, series: 16, firstUseMonth, pending },
    testedOn: [...yearly(2027 - checks, 2026, day), ...(pending === 'duplicate' ? ['2026-11-19'] : [])],
  })),
];

/** Cell types so rare that each of their banks has an owner of its own. */
const rareBelow = 10;

/** Deals the owners and what each of their banks is made of. The planned banks come first in the list. */
export function dealBanks(seed: number): {
  owners: DemoOwner[];
  dealt: { owner: number; cellTypeId: string; plan: PlannedBank | null }[];
} {
  const draws = createDraws(seed, 1);
  const owners = bankCounts(draws).map((banks) => ({ id: draws.uuid(), banks }));
  const planned = plannedBanks.map((plan) => ({ owner: plan.owner, cellTypeId: plan.cellTypeId, plan }));
  const left = new Map(cellTypes.map(({ id, banks }) => [id, banks]));
  for (const { cellTypeId } of planned) left.set(cellTypeId, left.get(cellTypeId)! - 1);
  const slots = cellTypes.flatMap(({ id }) => Array<string>(left.get(id)!).fill(id));
  const isRare = (id: string) => cellTypes.find((entry) => entry.id === id)!.banks < rareBelow;
  const rare = slots.filter(isRare);
  const common = draws.shuffled(slots.filter((id) => !isRare(id)));
  const firstFree = firstWaitingOwner + waiting.length;
  const singles = owners.flatMap(({ banks }, owner) => (banks === 1 && owner >= firstFree ? [owner] : []));
  const rareOwners = singles.slice(0, rare.length);
  const others = owners.flatMap(({ banks }, owner) =>
    owner < firstFree || rareOwners.includes(owner) ? [] : Array<number>(banks).fill(owner),
  );
  return {
    owners,
    dealt: [
      ...planned,
      ...rare.map((cellTypeId, place) => ({ owner: rareOwners[place]!, cellTypeId, plan: null })),
      ...common.map((cellTypeId, place) => ({ owner: others[place]!, cellTypeId, plan: null })),
    ],
  };
}

/** Banks of each owner: the planned owners' first, the rest shuffled. */
function bankCounts(draws: Draws): number[] {
  const all = ownersByBanks.flatMap(({ banks, owners }) => Array<number>(owners).fill(banks));
  const fixed = Array.from(
    { length: firstWaitingOwner + waiting.length },
    (_, owner) => plannedBanks.filter((plan) => plan.owner === owner).length,
  );
  for (const banks of fixed) all.splice(all.indexOf(banks), 1);
  return [...fixed, ...draws.shuffled(all)];
}
