import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { flag, id, moment, optionalText, reference, writtenOnce } from './base';

export class Recommendation extends Model<
	InferAttributes<Recommendation>,
	InferCreationAttributes<Recommendation>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare assessmentId: number;
	declare againstVerdict: boolean;
	declare decidedBy: string | null;
	declare reason: string | null;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initRecommendation(sequelize: Sequelize): void {
	Recommendation.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			assessmentId: reference,
			againstVerdict: flag,
			decidedBy: optionalText,
			reason: optionalText,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'recommendations', ...writtenOnce, modelName: 'Recommendation' }
	);
}
