import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class ThrottleModel extends Model<
  InferAttributes<ThrottleModel>,
  InferCreationAttributes<ThrottleModel>
> {
  declare key: string;
  declare failures: number;
  declare lastFailureAt: Date;
  declare opensAt: Date;
}

export function initThrottle(sequelize: Sequelize): void {
  ThrottleModel.init(
    {
      key: { type: DataTypes.TEXT, primaryKey: true },
      failures: { type: DataTypes.INTEGER, allowNull: false },
      lastFailureAt: { type: DataTypes.DATE, allowNull: false },
      opensAt: { type: DataTypes.DATE, allowNull: false },
    },
    { sequelize, tableName: 'throttles' },
  );
}
