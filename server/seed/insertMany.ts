import type { CreationAttributes, Model, ModelStatic, Transaction } from 'sequelize';

/** SQLite takes statements of up to a million characters; the widest rows are of about two thousand. */
const rowsPerStatement = 250;

/** Inserts any number of rows, some at a time. */
export async function insertMany<M extends Model>(
  model: ModelStatic<M>,
  rows: readonly CreationAttributes<M>[],
  transaction: Transaction,
): Promise<void> {
  for (let from = 0; from < rows.length; from += rowsPerStatement) {
    await model.bulkCreate(rows.slice(from, from + rowsPerStatement), { transaction });
  }
}
