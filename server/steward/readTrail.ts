import { Op, type WhereOptions } from 'sequelize';
import type { z } from 'zod';

import type { trailPageSchema, trailQuerySchema } from '@/lib/contract/steward';

import { TrailEntry, TrailText } from '../db/models';
import { hidePersonal } from '../moderation/personalText';

/**
 * A page of the trail, newest first. The trail holds no address by its making; what persons wrote beside it is shown
 * with what looks like one hidden.
 */
export async function readTrail(
  query: z.output<typeof trailQuerySchema>,
): Promise<z.input<typeof trailPageSchema>> {
  const { limit } = query;
  const rows = await TrailEntry.findAll({
    where: conditionsOf(query),
    include: [{ model: TrailText, as: 'texts', separate: true }],
    order: [['id', 'DESC']],
    limit: limit + 1,
  });
  const entries = rows.slice(0, limit);
  return { entries: entries.map(presentEntry), next: rows.length > limit ? entries.at(-1)!.id : null };
}

function conditionsOf({ kind, record, from, to, before }: z.output<typeof trailQuerySchema>): WhereOptions {
  const at = {
    ...(from ? { [Op.gte]: new Date(`${from}T00:00:00Z`) } : {}),
    ...(to ? { [Op.lte]: new Date(`${to}T23:59:59.999Z`) } : {}),
  };
  return {
    ...(kind ? { subjectType: kind } : {}),
    ...(record ? { subjectId: record } : {}),
    ...(from || to ? { at } : {}),
    ...(before ? { id: { [Op.lt]: before } } : {}),
  };
}

function presentEntry(entry: TrailEntry): z.input<typeof trailPageSchema>['entries'][number] {
  const { id, at, actorRole, actorId, subjectType, subjectId, action } = entry;
  const { textDigests = {}, ...details } = entry.details as { textDigests?: Record<string, string> };
  const words = new Map((entry.texts ?? []).map(({ field, text }) => [field, text]));
  return {
    ...{ id, at: at.toISOString(), actorRole, actorId, kind: subjectType, record: subjectId, action },
    details: Object.keys(details).length === 0 ? '' : hidePersonal(JSON.stringify(details, null, 1)),
    texts: Object.keys(textDigests).map((field) => {
      const text = words.get(field);
      return { field, text: text === undefined ? null : hidePersonal(text) };
    }),
  };
}
