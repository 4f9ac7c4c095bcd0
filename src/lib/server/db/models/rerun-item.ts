import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { RerunItemState, ToldHow } from '$lib/schemas/reruns';
import {
	flag,
	id,
	optionalMoment,
	optionalNumber,
	optionalReference,
	optionalText,
	reference,
	text,
	textOrEmpty
} from './base';

export class RerunItem extends Model<InferAttributes<RerunItem>, InferCreationAttributes<RerunItem>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare rerunId: number;
	declare jobId: number;
	declare mountId: number;
	/** The mount's newest one when the re-run began. */
	declare assessmentId: number;
	declare state: CreationOptional<RerunItemState>;
	/** Why it was passed over, or could not be run. */
	declare reason: CreationOptional<string>;
	declare newAssessmentId: CreationOptional<number | null>;
	/** Of the days drawn around the new assessment. */
	declare cutOutShare: CreationOptional<number | null>;
	declare verdictChanged: CreationOptional<boolean>;
	declare toldAt: CreationOptional<Date | null>;
	declare toldBy: CreationOptional<number | null>;
	declare toldHow: CreationOptional<ToldHow | null>;
}

export function initRerunItem(sequelize: Sequelize): void {
	RerunItem.init(
		{
			id: id,
			workshopId: reference,
			rerunId: reference,
			jobId: reference,
			mountId: reference,
			assessmentId: reference,
			state: { ...text, defaultValue: 'waiting' },
			reason: textOrEmpty,
			newAssessmentId: optionalReference,
			cutOutShare: optionalNumber,
			verdictChanged: { ...flag, defaultValue: false },
			toldAt: optionalMoment,
			toldBy: optionalReference,
			toldHow: optionalText
		},
		{ sequelize, tableName: 'rerun_items', timestamps: false, modelName: 'RerunItem' }
	);
}
