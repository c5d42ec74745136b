import type { Model, ModelStatic, Sequelize, Transaction } from 'sequelize';

/** Tables that what visitors see is made of. */
const watched = new Set([
  'users',
  'checks',
  'banks',
  'cellTypes',
  'quotedClaims',
  'currentFits',
  'publicMembers',
  'poolSteps',
]);

const counts = new WeakMap<Sequelize, number>();

/** How often the tables behind visitors' pages have changed in this process: equal counts, equal answers. */
export const changeCount = (db: Sequelize): number => counts.get(db) ?? 0;

interface WriteOptions {
  transaction?: Transaction | null;
  model?: ModelStatic<Model>;
}

/** Counts changes from now on, each once it is committed. SQLite has one writer: this process. */
export function watchChanges(db: Sequelize): void {
  const note = (table: string | undefined, transaction: Transaction | null | undefined) => {
    if (table !== undefined && !watched.has(table)) return;
    const count = () => void counts.set(db, changeCount(db) + 1);
    if (transaction) transaction.afterCommit(count);
    else count();
  };
  const tableOf = (model: unknown) =>
    typeof model === 'function' && 'tableName' in model ? String(model.tableName) : undefined;
  const ofRow = (row: Model, { transaction }: WriteOptions) => note(tableOf(row.constructor), transaction);
  const ofMany = ({ model, transaction }: WriteOptions) => note(tableOf(model), transaction);
  db.addHook('afterCreate', ofRow);
  db.addHook('afterUpdate', ofRow);
  db.addHook('afterDestroy', ofRow);
  db.addHook('afterBulkUpdate', ofMany);
  db.addHook('afterBulkDestroy', ofMany);
  db.addHook('afterBulkCreate', (rows: readonly Model[], options: WriteOptions) =>
    note(tableOf(rows[0]?.constructor), options.transaction),
  );
  db.addHook('afterUpsert', ([row]: [Model, boolean | null], options: WriteOptions) =>
    note(tableOf(row.constructor), options.transaction),
  );
}
