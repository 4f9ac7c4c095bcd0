import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { BookScope, BookState } from '$lib/schemas/books';
import {
	edited,
	id,
	moment,
	optionalMoment,
	optionalReference,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

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
	declare engineLayout: CreationOptional<BookScope['engineLayout']>;
	declare positionKind: CreationOptional<BookScope['positionKind']>;
	declare fromBookId: CreationOptional<number | null>;
	/** Unknown of a workshop's first book, which nobody made. */
	declare madeBy: CreationOptional<number | null>;
	declare inForceBy: CreationOptional<number | null>;
	declare inForceAt: CreationOptional<Date | null>;
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
			engineLayout: { ...text, defaultValue: 'any' },
			positionKind: { ...text, defaultValue: 'any' },
			fromBookId: optionalReference,
			madeBy: optionalReference,
			inForceBy: optionalReference,
			inForceAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'coefficient_books', ...edited, modelName: 'CoefficientBook' }
	);
}
