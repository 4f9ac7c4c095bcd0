import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Origin } from '$lib/schemas/books';
import { id, number, optionalReference, reference, text } from './base';

export class Coefficient extends Model<InferAttributes<Coefficient>, InferCreationAttributes<Coefficient>> {
	declare id: CreationOptional<number>;
	declare bookId: number;
	declare fieldGroup: string;
	declare fieldKey: string;
	declare value: number;
	declare unit: string;
	declare origin: CreationOptional<Origin>;
	/** That a fitted value came from. */
	declare fitId: CreationOptional<number | null>;
	declare source: string;
}

export function initCoefficient(sequelize: Sequelize): void {
	Coefficient.init(
		{
			id: id,
			bookId: reference,
			fieldGroup: text,
			fieldKey: text,
			value: number,
			unit: text,
			origin: { ...text, defaultValue: 'judgement' },
			fitId: optionalReference,
			source: text
		},
		{ sequelize, tableName: 'coefficients', timestamps: false, modelName: 'Coefficient' }
	);
}
