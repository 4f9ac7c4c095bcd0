import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { ErasureState } from '$lib/schemas/erasures';
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

/** A customer's wish that what is held about them be deleted, and what became of it. */
export class Erasure extends Model<InferAttributes<Erasure>, InferCreationAttributes<Erasure>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare customerId: number;
	declare askedBy: CreationOptional<number | null>;
	/** `running` lasts no longer than the transaction that deletes: what is immutable otherwise looks for it. */
	declare state: CreationOptional<ErasureState | 'running'>;
	/** Why it was refused. */
	declare reason: CreationOptional<string>;
	declare decidedBy: CreationOptional<number | null>;
	declare decidedAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initErasure(sequelize: Sequelize): void {
	Erasure.init(
		{
			id: id,
			workshopId: reference,
			customerId: reference,
			askedBy: optionalReference,
			state: { ...text, defaultValue: 'asked' },
			reason: textOrEmpty,
			decidedBy: optionalReference,
			decidedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'erasures', ...edited, modelName: 'Erasure' }
	);
}
