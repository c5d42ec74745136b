import type { DecisionRequest } from '@/lib/contract/moderation';
import { type Check, Job, OutboxMail } from '@/server/db/models';

import { addBank, addCheck, addOwner } from '../support/poolFixture';
import type { TestClient, TestServer } from '../support/testServer';

interface SubmissionOptions {
  ownerId?: string;
  bankId?: string;
  bought?: 'new' | 'used';
  state?: Check['state'];
  severity?: number;
  years?: number;
  sohFraction?: number;
}

/** A check of an owner's bank in the queue: six years old and at 90 % unless said otherwise. */
export async function addSubmission(options: SubmissionOptions = {}): Promise<Check> {
  const { ownerId, bought, state = 'submitted', severity, years = 6, sohFraction = 0.9 } = options;
  const bankId = options.bankId ?? (await addBank({ ownerId: ownerId ?? (await addOwner()).id, bought })).id;
  return addCheck({ bankId, years, efc: 150 * years, sohFraction, state, severity });
}

export const decide = (client: TestClient, checkId: string, decision: DecisionRequest) =>
  client.send('post', `/api/screening/${checkId}/decision`, decision);

/** Moves the clock on and lets what is due run. */
export async function settleAt(server: TestServer, instant: string): Promise<void> {
  server.setNow(instant);
  await server.deps.jobs.settle();
}

export async function countTraces() {
  return { mails: await OutboxMail.count(), refits: await Job.count({ where: { kind: 'refit' } }) };
}
