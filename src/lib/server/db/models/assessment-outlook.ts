import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Outlook, OutlookRequest } from '$lib/thermal/outlook';
import { id, json, moment, reference, text, writtenOnce } from './base';

/** What an assessment says beside its number: worked out once, from what is stored with it. */
export class AssessmentOutlook extends Model<
	InferAttributes<AssessmentOutlook>,
	InferCreationAttributes<AssessmentOutlook>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare assessmentId: number;
	declare engineVersion: string;
	/** All that went in, so that it can be made again. */
	declare request: OutlookRequest;
	declare outlook: Outlook;
	declare createdAt: CreationOptional<Date>;
}

export function initAssessmentOutlook(sequelize: Sequelize): void {
	AssessmentOutlook.init(
		{
			id: id,
			workshopId: reference,
			assessmentId: reference,
			engineVersion: text,
			request: json,
			outlook: json,
			createdAt: moment
		},
		{ sequelize, tableName: 'assessment_outlooks', ...writtenOnce, modelName: 'AssessmentOutlook' }
	);
}
