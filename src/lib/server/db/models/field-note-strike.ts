import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { id, moment, reference, text, writtenOnce } from './base';

/** A field note that was struck out: it stays on record, and counts nowhere. */
export class FieldNoteStrike extends Model<
	InferAttributes<FieldNoteStrike>,
	InferCreationAttributes<FieldNoteStrike>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare fieldNoteId: number;
	declare reason: string;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initFieldNoteStrike(sequelize: Sequelize): void {
	FieldNoteStrike.init(
		{
			id: id,
			workshopId: reference,
			fieldNoteId: reference,
			reason: text,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'field_note_strikes', ...writtenOnce, modelName: 'FieldNoteStrike' }
	);
}
