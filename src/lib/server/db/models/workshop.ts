import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { edited, id, moment, text, textOrEmpty, whole } from './base';

export class Workshop extends Model<InferAttributes<Workshop>, InferCreationAttributes<Workshop>> {
	declare id: CreationOptional<number>;
	declare name: string;
	declare address: CreationOptional<string>;
	declare phone: CreationOptional<string>;
	declare email: CreationOptional<string>;
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
			nextJobNumber: { ...whole, defaultValue: 1 },
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'workshops', ...edited, modelName: 'Workshop' }
	);
}
