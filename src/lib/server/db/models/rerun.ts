import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { RerunOccasion, RerunState } from '$lib/schemas/reruns';
import { id, moment, optionalMoment, reference, text, writtenOnce } from './base';

export class Rerun extends Model<InferAttributes<Rerun>, InferCreationAttributes<Rerun>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	/** The book whose coming or going is the occasion. */
	declare bookId: number;
	declare occasion: RerunOccasion;
	declare state: CreationOptional<RerunState>;
	declare begunBy: number;
	declare createdAt: CreationOptional<Date>;
	declare endedAt: CreationOptional<Date | null>;
}

export function initRerun(sequelize: Sequelize): void {
	Rerun.init(
		{
			id: id,
			workshopId: reference,
			bookId: reference,
			occasion: text,
			state: { ...text, defaultValue: 'running' },
			begunBy: reference,
			createdAt: moment,
			endedAt: optionalMoment
		},
		{ sequelize, tableName: 'reruns', ...writtenOnce, modelName: 'Rerun' }
	);
}
