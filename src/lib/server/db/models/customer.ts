import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { edited, id, moment, reference, text, textOrEmpty, whole } from './base';

export class Customer extends Model<InferAttributes<Customer>, InferCreationAttributes<Customer>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare email: CreationOptional<string>;
	declare phone: CreationOptional<string>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initCustomer(sequelize: Sequelize): void {
	Customer.init(
		{
			id: id,
			workshopId: reference,
			name: text,
			email: textOrEmpty,
			phone: textOrEmpty,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'customers', ...edited, modelName: 'Customer' }
	);
}
