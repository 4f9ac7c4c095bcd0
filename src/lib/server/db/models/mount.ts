import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { PositionKind, SurveyAnswers } from '$lib/schemas/survey';
import type { CableInput } from '$lib/schemas/cables';
import { edited, flag, id, json, moment, optionalJson, optionalMoment, reference, text, whole } from './base';

export class Mount extends Model<InferAttributes<Mount>, InferCreationAttributes<Mount>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare letter: string;
	declare name: string;
	declare positionKind: PositionKind;
	declare survey: SurveyAnswers;
	declare surveyComplete: CreationOptional<boolean>;
	/** Proposed cable and fuse; null when nobody has said. */
	declare cable: CreationOptional<CableInput | null>;
	declare removedAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initMount(sequelize: Sequelize): void {
	Mount.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			letter: text,
			name: text,
			positionKind: text,
			survey: json,
			surveyComplete: { ...flag, defaultValue: false },
			cable: optionalJson,
			removedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'mounts', ...edited, modelName: 'Mount' }
	);
}
