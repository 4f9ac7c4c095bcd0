import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Role } from '$lib/schemas/people';
import {
	edited,
	flag,
	id,
	moment,
	optionalMoment,
	optionalReference,
	optionalText,
	reference,
	text,
	whole
} from './base';

export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare customerId: CreationOptional<number | null>;
	declare name: string;
	declare email: string;
	declare role: Role;
	declare passwordHash: CreationOptional<string | null>;
	declare active: CreationOptional<boolean>;
	declare lastSignedInAt: CreationOptional<Date | null>;
	declare leftAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initPerson(sequelize: Sequelize): void {
	Person.init(
		{
			id: id,
			workshopId: reference,
			customerId: optionalReference,
			name: text,
			email: text,
			role: text,
			passwordHash: optionalText,
			active: { ...flag, defaultValue: true },
			lastSignedInAt: optionalMoment,
			leftAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'people', ...edited, modelName: 'Person' }
	);
}
