import { DataTypes, type Model, type ModelAttributeColumnOptions } from 'sequelize';

/**
 * Column definitions that all models share. Sequelize chooses how to read a value by the declared SQL type, and STRICT
 * tables know neither JSON nor booleans: hence the getters here.
 */

export const integer = (options: Partial<ModelAttributeColumnOptions> = {}) => ({
  type: DataTypes.BIGINT,
  allowNull: false,
  ...options,
});

/** UTC milliseconds. */
export const time = integer;

export const real = (options: Partial<ModelAttributeColumnOptions> = {}) => ({
  type: DataTypes.DOUBLE,
  allowNull: false,
  ...options,
});

export const text = (options: Partial<ModelAttributeColumnOptions> = {}) => ({
  type: DataTypes.TEXT,
  allowNull: false,
  ...options,
});

/** An object or array kept as JSON text; never a bare string, which could not be told from its own text. */
export const json = (attribute: string, options: Partial<ModelAttributeColumnOptions> = {}) => ({
  type: DataTypes.JSON,
  allowNull: false,
  get(this: Model): unknown {
    const stored: unknown = this.getDataValue(attribute as never);
    return typeof stored === 'string' ? JSON.parse(stored) : stored;
  },
  ...options,
});

/** Stored as 0 or 1. */
export const flag = (attribute: string, options: Partial<ModelAttributeColumnOptions> = {}) => ({
  type: DataTypes.BOOLEAN,
  allowNull: false,
  get(this: Model): boolean | null {
    const stored: unknown = this.getDataValue(attribute as never);
    return stored === null || stored === undefined ? null : Boolean(stored);
  },
  ...options,
});

/** Numbered by SQLite. */
export const rowId = { type: DataTypes.INTEGER, primaryKey: true, autoIncrement: true, allowNull: false };
