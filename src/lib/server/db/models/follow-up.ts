import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { day, edited, id, moment, optionalDay, optionalMoment, optionalText, reference, whole } from './base';

/** A look at a fitted battery that is due some months after. */
export class FollowUp extends Model<InferAttributes<FollowUp>, InferCreationAttributes<FollowUp>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare installationId: number;
	declare afterMonths: number;
	declare dueOn: string;
	declare doneOn: CreationOptional<string | null>;
	declare doneBy: CreationOptional<string | null>;
	/** When its reminder was put into the outbox; one is enough. */
	declare remindedAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initFollowUp(sequelize: Sequelize): void {
	FollowUp.init(
		{
			id: id,
			workshopId: reference,
			installationId: reference,
			afterMonths: whole,
			dueOn: day,
			doneOn: optionalDay,
			doneBy: optionalText,
			remindedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'follow_ups', ...edited, modelName: 'FollowUp' }
	);
}
