import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Chemistry } from '$lib/schemas/batteries';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import type { Verdict } from '$lib/schemas/verdicts';
import { id, json, moment, number, optionalNumber, reference, text, writtenOnce } from './base';

export class Assessment extends Model<InferAttributes<Assessment>, InferCreationAttributes<Assessment>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare mountId: number;
	declare bookId: number;
	declare engineVersion: string;
	declare inputs: AssessmentInputs;
	declare inputsSha256: string;
	declare result: AssessmentResult;
	declare chemistry: CreationOptional<Chemistry>;
	declare verdict: Verdict;
	declare headroomK: number;
	declare peakCellsC: number;
	declare peakAtHour: number;
	declare cutAtHour: number | null;
	declare resetAtHour: number | null;
	declare darkHours: number;
	declare chargeMissedAh: number;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initAssessment(sequelize: Sequelize): void {
	Assessment.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			mountId: reference,
			bookId: reference,
			engineVersion: text,
			inputs: json,
			inputsSha256: { ...text, field: 'inputs_sha256' },
			result: json,
			chemistry: { ...text, defaultValue: 'lithium-iron-phosphate' },
			verdict: text,
			headroomK: number,
			peakCellsC: number,
			peakAtHour: number,
			cutAtHour: optionalNumber,
			resetAtHour: optionalNumber,
			darkHours: number,
			chargeMissedAh: number,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'assessments', ...writtenOnce, modelName: 'Assessment' }
	);
}
