import { Sequelize, UniqueConstraintError, type Transaction } from 'sequelize';
import { config } from './config';
import { initModels } from './models';

declare global {
  var holdfastSequelize: Sequelize | undefined;
}

/** The application's connection pool, as the role that owns nothing. Kept on `globalThis`: a reload in development must not leak pools. */
export function database(): Sequelize {
  globalThis.holdfastSequelize ??= connect();
  return globalThis.holdfastSequelize;
}

function connect(): Sequelize {
  const sequelize = new Sequelize(config().databaseUrl, {
    dialect: 'postgres',
    logging: false,
    pool: { max: config().databaseConnections, min: 0, acquire: 15_000, idle: 10_000 },
    define: { underscored: true, timestamps: false },
  });
  initModels(sequelize);
  return sequelize;
}

export type Tx = Transaction;

/** Runs `work` in one transaction: all of it holds, or none. Services own transactions; repositories take `tx`. */
export function inTransaction<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  return database().transaction(work);
}

/** Whether a write failed because what it adds is there already. */
export const isDuplicate = (error: unknown): boolean => error instanceof UniqueConstraintError;
