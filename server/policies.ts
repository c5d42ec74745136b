import type { Role } from '@/lib/contract/accounts';

import { AppError } from './errors';

export type Actor =
  | { role: 'visitor' }
  /** `familyId` names the sign-in, for CSRF and sign-out. */
  | {
      role: Role;
      userId: string;
      familyId: string;
      /** The sign-in must ask for a code before the work of the role may be done. */
      isSecondFactorDue?: boolean;
    };

export type SignedInActor = Extract<Actor, { userId: string }>;

export type ActorRole = Actor['role'];

/** What a record-level rule may look at. */
export interface OwnedRecord {
  ownerId: string;
}

interface Policy {
  roles: readonly ActorRole[];
  /** Rule on the record; a refusal answers as if it were not there. */
  record?: (actor: Actor, record: OwnedRecord) => boolean;
}

const everyone: readonly ActorRole[] = ['visitor', 'owner', 'moderator', 'steward'];
const signedIn: readonly ActorRole[] = ['owner', 'moderator', 'steward'];
const stewards: readonly ActorRole[] = ['steward'];
const screeners: readonly ActorRole[] = ['moderator', 'steward'];

const isHeldBack = (actor: Actor) => actor.role !== 'visitor' && actor.isSecondFactorDue === true;

const isOwn = (actor: Actor, record: OwnedRecord) =>
  actor.role !== 'visitor' && actor.userId === record.ownerId;
/** What moderators need to see to judge a check. */
const isOwnOrScreened = (actor: Actor, record: OwnedRecord) =>
  isOwn(actor, record) || (screeners.includes(actor.role) && !isHeldBack(actor));
const isNotOwn = (actor: Actor, record: OwnedRecord) => !isOwn(actor, record);

/** Who may do what, the one place. Actions are named noun.verb. */
export const policies = {
  'accounts.open': { roles: everyone },
  'accounts.own': { roles: signedIn },
  'ownData.read': { roles: signedIn },
  'ownData.erase': { roles: signedIn },
  /** By the signed token of a mail. */
  'links.use': { roles: everyone },
  'outbox.read': { roles: everyone },
  'cells.read': { roles: everyone },
  'cellTypes.read': { roles: everyone },
  'cellTypes.propose': { roles: signedIn },
  'banks.list': { roles: signedIn },
  'banks.create': { roles: signedIn },
  'banks.read': { roles: signedIn, record: isOwn },
  'banks.update': { roles: signedIn, record: isOwn },
  'standing.read': { roles: signedIn, record: isOwn },
  'records.list': { roles: signedIn, record: isOwn },
  'records.create': { roles: signedIn, record: isOwn },
  'records.revoke': { roles: signedIn, record: isOwn },
  /** By the token of its link. */
  'records.readShared': { roles: everyone },
  'reminders.read': { roles: signedIn, record: isOwn },
  'reminders.update': { roles: signedIn, record: isOwn },
  'uploads.create': { roles: signedIn, record: isOwn },
  'uploads.read': { roles: signedIn, record: isOwn },
  'uploads.update': { roles: signedIn, record: isOwn },
  'photos.create': { roles: signedIn, record: isOwn },
  'photos.read': { roles: signedIn, record: isOwnOrScreened },
  'photos.remove': { roles: signedIn, record: isOwn },
  'checks.create': { roles: signedIn, record: isOwn },
  'checks.read': { roles: signedIn, record: isOwn },
  'checks.update': { roles: signedIn, record: isOwn },
  /** Of banks of one's own; each is looked up by checks.create. */
  'earlierChecks.send': { roles: signedIn },
  'screening.read': { roles: screeners },
  'screening.decide': { roles: screeners, record: isNotOwn },
  'catalogue.read': { roles: screeners },
  'catalogue.update': { roles: screeners },
  'agreement.read': { roles: screeners },
  'agreement.review': { roles: screeners, record: isNotOwn },
  /** Moves public figures by one owner's check. */
  'screening.recallAtOnce': { roles: stewards, record: isNotOwn },
  'steward.read': { roles: stewards },
  'steward.act': { roles: stewards },
  'fits.read': { roles: screeners },
  'fits.readPublic': { roles: everyone },
  'releases.read': { roles: everyone },
  'publicApi.read': { roles: everyone },
  'releases.make': { roles: ['steward'] },
} as const satisfies Record<string, Policy>;

export type Action = keyof typeof policies;

/**
 * Refuses by role: 401 for visitors, 403 for accounts that may never do this, and for those who may, but must set up the
 * second step of their sign-in first.
 */
export function authorize(actor: Actor, action: Action): void {
  const { roles }: Policy = policies[action];
  if (roles.includes(actor.role)) {
    if (!roles.includes('owner') && isHeldBack(actor)) throw new AppError('secondFactorDue');
    return;
  }
  throw new AppError(actor.role === 'visitor' ? 'notSignedIn' : 'notAllowed');
}

/** Refuses by record: 404, so that nothing is learned of others' records. */
export function authorizeRecord(actor: Actor, action: Action, record: OwnedRecord): void {
  authorize(actor, action);
  const { record: rule }: Policy = policies[action];
  if (rule && !rule(actor, record)) throw new AppError('notFound');
}

/** The signed-in actor; for routes whose policy lets no visitor in. */
export function signedInActor(actor: Actor): Extract<Actor, { userId: string }> {
  if (actor.role === 'visitor') throw new AppError('notSignedIn');
  return actor;
}
