import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { FileKind } from '$lib/schemas/files';
import {
	edited,
	id,
	moment,
	optionalMoment,
	optionalNumber,
	optionalReference,
	optionalText,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

/** A photo or a document of a mount; its content is in the storage. */
export class StoredFile extends Model<InferAttributes<StoredFile>, InferCreationAttributes<StoredFile>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare mountId: number;
	declare kind: FileKind;
	/** Where it belongs beside the mount: to a question before drilling, to a note of the field, or to neither. */
	declare questionKey: CreationOptional<string | null>;
	declare fieldNoteId: CreationOptional<number | null>;
	/** The mount, where this is its picture: the table takes one a mount. */
	declare pictureOf: CreationOptional<number | null>;
	declare caption: CreationOptional<string>;
	/** As it was called where it came from. */
	declare name: string;
	declare widthPx: number | null;
	declare heightPx: number | null;
	declare bytes: number;
	declare sha256: string;
	/** What its content is called in the storage. */
	declare contentId: string;
	declare uploadedBy: number;
	declare removedAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initStoredFile(sequelize: Sequelize): void {
	StoredFile.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			mountId: reference,
			kind: text,
			questionKey: optionalText,
			fieldNoteId: optionalReference,
			pictureOf: optionalReference,
			caption: textOrEmpty,
			name: text,
			widthPx: optionalNumber,
			heightPx: optionalNumber,
			bytes: whole,
			sha256: text,
			contentId: text,
			uploadedBy: reference,
			removedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'stored_files', ...edited, modelName: 'StoredFile' }
	);
}
