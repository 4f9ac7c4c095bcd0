import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { CautionLine } from '$lib/schemas/caution-texts';
import type { PreDrillSnapshot } from '$lib/schemas/pre-drill';
import { flag, id, moment, optionalJson, optionalText, reference, whole, writtenOnce } from './base';

export class Recommendation extends Model<
	InferAttributes<Recommendation>,
	InferCreationAttributes<Recommendation>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	/** Which one of its job: what people call it by. */
	declare number: number;
	declare assessmentId: number;
	declare againstVerdict: boolean;
	/** The maker does not allow it there; asked only since somebody has to answer for it. */
	declare againstMaker: CreationOptional<boolean>;
	declare decidedBy: string | null;
	declare reason: string | null;
	/** Whom the paper names; null for those that name whom their assessment names. */
	declare madeOutTo: CreationOptional<string | null>;
	/** The check before drilling as it stood; null for those that were made before there was one. */
	declare preDrill: CreationOptional<PreDrillSnapshot | null>;
	/** The cautions as they read when it was issued; null for those from before they were kept. */
	declare cautions: CreationOptional<CautionLine[] | null>;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initRecommendation(sequelize: Sequelize): void {
	Recommendation.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			number: whole,
			assessmentId: reference,
			againstVerdict: flag,
			againstMaker: { ...flag, defaultValue: false },
			decidedBy: optionalText,
			reason: optionalText,
			madeOutTo: optionalText,
			preDrill: optionalJson,
			cautions: optionalJson,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'recommendations', ...writtenOnce, modelName: 'Recommendation' }
	);
}
