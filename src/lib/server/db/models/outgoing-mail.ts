import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { LetterKind } from '$lib/schemas/letters';
import type { MailState } from '$lib/schemas/sheets';
import {
	id,
	moment,
	optionalMoment,
	optionalReference,
	reference,
	text,
	textOrEmpty,
	whole,
	writtenOnce
} from './base';

export class OutgoingMail extends Model<
	InferAttributes<OutgoingMail>,
	InferCreationAttributes<OutgoingMail>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare kind: LetterKind;
	declare sheetId: CreationOptional<number | null>;
	declare jobId: CreationOptional<number | null>;
	/** The request for deletion that it answers. */
	declare erasureId: CreationOptional<number | null>;
	declare messageId: string;
	declare recipient: string;
	/** Whom an answer reaches, where that is not the sender. */
	declare replyTo: CreationOptional<string>;
	/** Where its reader can stop letters of its kind; none for letters that nobody stops. */
	declare stopUrl: CreationOptional<string>;
	declare subject: string;
	declare textBody: string;
	declare htmlBody: string;
	declare state: CreationOptional<MailState>;
	declare attempts: CreationOptional<number>;
	declare nextAttemptAt: Date;
	declare lastError: CreationOptional<string>;
	/** From just before the server can have it until its answer. */
	declare handedOverAt: CreationOptional<Date | null>;
	declare sentAt: CreationOptional<Date | null>;
	declare createdAt: CreationOptional<Date>;
}

export function initOutgoingMail(sequelize: Sequelize): void {
	OutgoingMail.init(
		{
			id: id,
			workshopId: reference,
			kind: text,
			sheetId: optionalReference,
			jobId: optionalReference,
			erasureId: optionalReference,
			messageId: text,
			recipient: text,
			replyTo: textOrEmpty,
			stopUrl: textOrEmpty,
			subject: text,
			textBody: { type: DataTypes.TEXT, allowNull: false },
			htmlBody: { type: DataTypes.TEXT, allowNull: false },
			state: { ...text, defaultValue: 'waiting' },
			attempts: { ...whole, defaultValue: 0 },
			nextAttemptAt: moment,
			lastError: textOrEmpty,
			handedOverAt: optionalMoment,
			sentAt: optionalMoment,
			createdAt: moment
		},
		{ sequelize, tableName: 'outgoing_mails', ...writtenOnce, modelName: 'OutgoingMail' }
	);
}
