import { DataTypes, type ModelAttributeColumnOptions } from 'sequelize';

/**
 * Column shapes that the models share, made anew for each: Sequelize writes into what it is given.
 * The database's own rules are in the migrations.
 */
export const id = (): ModelAttributeColumnOptions => ({ type: DataTypes.UUID, primaryKey: true });
export const uuid = (): ModelAttributeColumnOptions => ({ type: DataTypes.UUID, allowNull: false });
export const uuidOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.UUID });
export const text = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT, allowNull: false });
export const textOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT });
export const integer = (): ModelAttributeColumnOptions => ({ type: DataTypes.INTEGER, allowNull: false });
export const integerOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.INTEGER });
export const number = (): ModelAttributeColumnOptions => ({ type: DataTypes.DOUBLE, allowNull: false });
export const numberOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.DOUBLE });
export const bool = (): ModelAttributeColumnOptions => ({ type: DataTypes.BOOLEAN, allowNull: false });
export const boolOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.BOOLEAN });
export const instant = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATE, allowNull: false });
export const instantOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATE });
export const json = (): ModelAttributeColumnOptions => ({ type: DataTypes.JSONB, allowNull: false });
export const date = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATEONLY, allowNull: false });
export const dateOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATEONLY });
/** Time of day and wall-clock moment, `HH:MM` and `YYYY-MM-DDTHH:MM`: text in and out. */
export const clock = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT, allowNull: false });
export const clockOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT });
export const localOrNull = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT });
export const texts = (): ModelAttributeColumnOptions => ({ type: DataTypes.ARRAY(DataTypes.TEXT), allowNull: false });
export const integers = (): ModelAttributeColumnOptions => ({
  type: DataTypes.ARRAY(DataTypes.SMALLINT),
  allowNull: false,
});
export const uuids = (): ModelAttributeColumnOptions => ({ type: DataTypes.ARRAY(DataTypes.UUID), allowNull: false });
