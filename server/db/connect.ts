import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';

import { Sequelize, Transaction } from 'sequelize';
import sqlite3 from 'sqlite3';

import { initModels } from './models';

/** How long a connection waits for another's write lock, ms. */
const busyTimeoutMs = 10_000;

/** Sequelize opens one SQLite connection per transaction and runs no connect hook, so the timeout is set here. */
class PatientDatabase extends sqlite3.Database {
  constructor(file: string, mode: number, done: (error: Error | null) => void) {
    super(file, mode, done);
    this.configure('busyTimeout', busyTimeoutMs);
  }
}

/**
 * Opens the database file and binds the models to it. SQLite takes its write lock at the start of a transaction
 * (IMMEDIATE), else two read-then-write transactions end in BUSY. Sequelize turns foreign keys on itself.
 */
export async function connect(file: string): Promise<Sequelize> {
  mkdirSync(dirname(file), { recursive: true });
  const sequelize = new Sequelize({
    dialect: 'sqlite',
    dialectModule: { ...sqlite3, Database: PatientDatabase },
    storage: file,
    logging: false,
    transactionType: Transaction.TYPES.IMMEDIATE,
  });
  await sequelize.query('PRAGMA journal_mode = WAL');
  initModels(sequelize);
  return sequelize;
}
