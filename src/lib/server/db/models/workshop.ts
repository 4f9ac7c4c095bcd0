import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { edited, flag, id, moment, optionalText, text, textOrEmpty, whole } from './base';

export class Workshop extends Model<InferAttributes<Workshop>, InferCreationAttributes<Workshop>> {
	declare id: CreationOptional<number>;
	declare name: string;
	declare address: CreationOptional<string>;
	declare phone: CreationOptional<string>;
	declare email: CreationOptional<string>;
	declare businessNumber: CreationOptional<string>;
	declare web: CreationOptional<string>;
	/** Of its logos the one that is printed now. */
	declare logoSha256: CreationOptional<string | null>;
	declare requiresSecondFactor: CreationOptional<boolean>;
	/** Customers' personal data go so many years after the last change to their jobs; null keeps them. */
	declare retentionYears: CreationOptional<number | null>;
	declare nextJobNumber: CreationOptional<number>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initWorkshop(sequelize: Sequelize): void {
	Workshop.init(
		{
			id: id,
			name: text,
			address: textOrEmpty,
			phone: textOrEmpty,
			email: textOrEmpty,
			businessNumber: textOrEmpty,
			web: textOrEmpty,
			logoSha256: { ...optionalText, field: 'logo_sha256' },
			requiresSecondFactor: { ...flag, defaultValue: false },
			retentionYears: { type: DataTypes.TINYINT.UNSIGNED, allowNull: true },
			nextJobNumber: { ...whole, defaultValue: 1 },
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'workshops', ...edited, modelName: 'Workshop' }
	);
}
