import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { FieldFinding } from '$lib/schemas/field-notes';
import { id, json, moment, reference, text, writtenOnce } from './base';

/** What a note says by an assessment that its battery came to be held against after it was noted. */
export class FieldNoteFinding extends Model<
	InferAttributes<FieldNoteFinding>,
	InferCreationAttributes<FieldNoteFinding>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare fieldNoteId: number;
	declare assessmentId: number;
	declare finding: FieldFinding;
	declare engineVersion: string;
	declare createdAt: CreationOptional<Date>;
}

export function initFieldNoteFinding(sequelize: Sequelize): void {
	FieldNoteFinding.init(
		{
			id: id,
			workshopId: reference,
			fieldNoteId: reference,
			assessmentId: reference,
			finding: json,
			engineVersion: text,
			createdAt: moment
		},
		{ sequelize, tableName: 'field_note_findings', ...writtenOnce, modelName: 'FieldNoteFinding' }
	);
}
