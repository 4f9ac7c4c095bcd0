import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { edited, id, moment, optionalMoment, reference, text, textOrEmpty, whole } from './base';

export class Customer extends Model<InferAttributes<Customer>, InferCreationAttributes<Customer>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare email: CreationOptional<string>;
	declare phone: CreationOptional<string>;
	/** When they stopped reminders; null while they get them. */
	declare remindersStoppedAt: CreationOptional<Date | null>;
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
			remindersStoppedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'customers', ...edited, modelName: 'Customer' }
	);
}
