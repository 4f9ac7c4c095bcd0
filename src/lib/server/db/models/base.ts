import { DataTypes } from 'sequelize';

/** Column shapes that several models share. */
export const id = { type: DataTypes.BIGINT.UNSIGNED, autoIncrement: true, primaryKey: true } as const;
export const reference = { type: DataTypes.BIGINT.UNSIGNED, allowNull: false } as const;
export const optionalReference = { type: DataTypes.BIGINT.UNSIGNED, allowNull: true } as const;
export const text = { type: DataTypes.STRING, allowNull: false } as const;
export const optionalText = { type: DataTypes.STRING, allowNull: true } as const;
export const textOrEmpty = { type: DataTypes.STRING, allowNull: false, defaultValue: '' } as const;
export const number = { type: DataTypes.DOUBLE, allowNull: false } as const;
export const optionalNumber = { type: DataTypes.DOUBLE, allowNull: true } as const;
export const whole = { type: DataTypes.INTEGER.UNSIGNED, allowNull: false } as const;
export const flag = { type: DataTypes.BOOLEAN, allowNull: false } as const;
export const optionalFlag = { type: DataTypes.BOOLEAN, allowNull: true } as const;
export const json = { type: DataTypes.JSON, allowNull: false } as const;
export const optionalJson = { type: DataTypes.JSON, allowNull: true } as const;
/** A day without a time, as "2026-03-04". */
export const day = { type: DataTypes.DATEONLY, allowNull: false } as const;
export const optionalDay = { type: DataTypes.DATEONLY, allowNull: true } as const;
export const moment = { type: DataTypes.DATE(3), allowNull: false } as const;
export const optionalMoment = { type: DataTypes.DATE(3), allowNull: true } as const;

/** What people edit carries a version: a save against an older one is refused. */
export const edited = { version: true, timestamps: true } as const;
/** What is written once. */
export const writtenOnce = { timestamps: true, updatedAt: false } as const;
