import type { Sequelize } from 'sequelize';

/** Declares every model on a connection. One line a model, in the order of the migrations. */
export function initModels(_sequelize: Sequelize): void {}
