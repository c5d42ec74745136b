import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';

import { Sequelize, Transaction, type TransactionOptions } from 'sequelize';
import sqlite3 from 'sqlite3';

import { initModels } from './models';
import { watchChanges } from './watchChanges';

/**
 * How long SQLite itself waits for another's write lock, ms. Short, because the wait holds a thread of Node's pool of
 * four: a few waiting writers would keep the one that has the lock from going on.
 */
const busyTimeoutMs = 20;
/** After that the statement is tried again without holding a thread, for about ten seconds in all. */
const busyRetry = { match: [/SQLITE_BUSY/], max: 50, backoffBase: 10, backoffExponent: 1.1 };

/** Sequelize opens one SQLite connection per transaction and runs no connect hook, so the timeout is set here. */
class PatientDatabase extends sqlite3.Database {
  constructor(file: string, mode: number, done: (error: Error | null) => void) {
    super(file, mode, done);
    this.configure('busyTimeout', busyTimeoutMs);
  }
}

type Work<T> = (transaction: Transaction) => PromiseLike<T>;

/** SQLite has one writer at a time: transactions of this process queue in order instead of racing for the lock. */
class QueuedSequelize extends Sequelize {
  private last: Promise<unknown> = Promise.resolve();

  override transaction<T>(options: TransactionOptions, work: Work<T>): Promise<T>;
  override transaction<T>(work: Work<T>): Promise<T>;
  override transaction(options?: TransactionOptions): Promise<Transaction>;
  override transaction<T>(first?: TransactionOptions | Work<T>, second?: Work<T>): Promise<T | Transaction> {
    const work = typeof first === 'function' ? first : second;
    const options = typeof first === 'function' ? {} : (first ?? {});
    if (!work) return super.transaction(options);
    const turn = this.last.then(() => super.transaction(options, work));
    this.last = turn.catch(() => undefined);
    return turn;
  }
}

/**
 * Opens the database file and binds the models to it. SQLite takes its write lock at the start of a transaction
 * (IMMEDIATE), else two read-then-write transactions end in BUSY. Sequelize turns foreign keys on itself.
 */
export async function connect(file: string): Promise<Sequelize> {
  mkdirSync(dirname(file), { recursive: true });
  const sequelize = new QueuedSequelize({
    dialect: 'sqlite',
    dialectModule: { ...sqlite3, Database: PatientDatabase },
    storage: file,
    logging: false,
    transactionType: Transaction.TYPES.IMMEDIATE,
    retry: busyRetry,
  });
  await sequelize.query('PRAGMA journal_mode = WAL');
  initModels(sequelize);
  watchChanges(sequelize);
  return sequelize;
}
