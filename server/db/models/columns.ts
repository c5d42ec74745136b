import { randomUUID } from 'node:crypto';

import { DataTypes } from 'sequelize';

// Column shorthands; the constraints themselves stand in the migrations. Functions, as Sequelize writes into each.
export const uuidKey = () => ({ type: DataTypes.STRING, primaryKey: true, defaultValue: () => randomUUID() });
export const countingKey = () => ({ type: DataTypes.INTEGER, primaryKey: true, autoIncrement: true });
export const textKey = () => ({ type: DataTypes.STRING, allowNull: false, primaryKey: true });
export const string = () => ({ type: DataTypes.STRING, allowNull: false });
export const optionalString = () => ({ type: DataTypes.STRING });
export const longText = () => ({ type: DataTypes.TEXT, allowNull: false });
export const real = (defaultValue?: number) => ({ type: DataTypes.DOUBLE, allowNull: false, defaultValue });
export const optionalReal = () => ({ type: DataTypes.DOUBLE });
export const whole = (defaultValue?: number) => ({ type: DataTypes.INTEGER, allowNull: false, defaultValue });
export const optionalWhole = () => ({ type: DataTypes.INTEGER });
export const json = () => ({ type: DataTypes.JSON, allowNull: false });
export const optionalJson = () => ({ type: DataTypes.JSON });
export const instant = () => ({ type: DataTypes.DATE, allowNull: false });
export const optionalInstant = () => ({ type: DataTypes.DATE });
export const yesNo = (defaultValue?: boolean) => ({
  type: DataTypes.BOOLEAN,
  allowNull: false,
  defaultValue,
});
