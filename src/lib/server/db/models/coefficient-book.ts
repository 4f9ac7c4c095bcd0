import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { BookState } from '$lib/schemas/books';
import { edited, id, moment, reference, text, textOrEmpty, whole } from './base';

export class CoefficientBook extends Model<
	InferAttributes<CoefficientBook>,
	InferCreationAttributes<CoefficientBook>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare number: number;
	declare name: string;
	declare state: BookState;
	declare note: CreationOptional<string>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initCoefficientBook(sequelize: Sequelize): void {
	CoefficientBook.init(
		{
			id: id,
			workshopId: reference,
			number: whole,
			name: text,
			state: text,
			note: textOrEmpty,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'coefficient_books', ...edited, modelName: 'CoefficientBook' }
	);
}
