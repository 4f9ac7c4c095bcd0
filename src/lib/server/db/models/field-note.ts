import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { FieldFinding, FieldNoteData, FieldNoteKind } from '$lib/schemas/field-notes';
import { day, id, json, moment, optionalJson, reference, text, writtenOnce } from './base';

/** What somebody noted of a fitted battery, with what the model made of it; kept for good. */
export class FieldNote extends Model<InferAttributes<FieldNote>, InferCreationAttributes<FieldNote>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare installationId: number;
	declare kind: FieldNoteKind;
	declare notedOn: string;
	declare data: FieldNoteData;
	declare finding: FieldFinding | null;
	declare engineVersion: string;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initFieldNote(sequelize: Sequelize): void {
	FieldNote.init(
		{
			id: id,
			workshopId: reference,
			installationId: reference,
			kind: text,
			notedOn: day,
			data: json,
			finding: optionalJson,
			engineVersion: text,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'field_notes', ...writtenOnce, modelName: 'FieldNote' }
	);
}
