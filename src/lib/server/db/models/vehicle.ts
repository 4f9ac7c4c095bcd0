import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize
} from 'sequelize';
import type { EngineLayout } from '$lib/schemas/vehicles';
import { edited, id, moment, number, reference, text, textOrEmpty, whole } from './base';
import type { Customer } from './customer';

export class Vehicle extends Model<InferAttributes<Vehicle>, InferCreationAttributes<Vehicle>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare customerId: number;
	declare make: string;
	declare model: string;
	declare modelYear: number;
	declare registration: CreationOptional<string>;
	declare engineLayout: EngineLayout;
	declare massKg: number;
	declare dragAreaM2: number;
	declare towMassKg: CreationOptional<number>;
	declare towDragAreaM2: CreationOptional<number>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
	declare customer?: NonAttribute<Customer>;
}

export function initVehicle(sequelize: Sequelize): void {
	Vehicle.init(
		{
			id: id,
			workshopId: reference,
			customerId: reference,
			make: text,
			model: text,
			modelYear: whole,
			registration: textOrEmpty,
			engineLayout: text,
			massKg: number,
			dragAreaM2: number,
			towMassKg: { ...number, defaultValue: 0 },
			towDragAreaM2: { ...number, defaultValue: 0 },
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'vehicles', ...edited, modelName: 'Vehicle' }
	);
}
