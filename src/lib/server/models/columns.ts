import { DataTypes } from 'sequelize';

/** Column types that many models share. Defaults of the database stand in the migrations; these only let a row be built without them. */
export const key = { type: DataTypes.UUID, primaryKey: true } as const;
export const uuid = { type: DataTypes.UUID, allowNull: false } as const;
export const maybeUuid = { type: DataTypes.UUID, allowNull: true } as const;
export const text = { type: DataTypes.TEXT, allowNull: false } as const;
export const textOrEmpty = { type: DataTypes.TEXT, allowNull: false, defaultValue: '' } as const;
export const maybeText = { type: DataTypes.TEXT, allowNull: true } as const;
export const number = { type: DataTypes.DOUBLE, allowNull: false } as const;
export const maybeNumber = { type: DataTypes.DOUBLE, allowNull: true } as const;
export const whole = { type: DataTypes.INTEGER, allowNull: false } as const;
export const maybeWhole = { type: DataTypes.INTEGER, allowNull: true } as const;
export const json = { type: DataTypes.JSONB, allowNull: false } as const;
export const maybeJson = { type: DataTypes.JSONB, allowNull: true } as const;
export const maybeInstant = { type: DataTypes.DATE, allowNull: true } as const;
export const instant = { type: DataTypes.DATE, allowNull: false } as const;
export const now = { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW } as const;
export const revision = { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 } as const;
