import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
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
	declare sheetId: CreationOptional<number | null>;
	declare messageId: string;
	declare recipient: string;
	declare subject: string;
	declare textBody: string;
	declare htmlBody: string;
	declare state: CreationOptional<'waiting' | 'sent' | 'failed'>;
	declare attempts: CreationOptional<number>;
	declare nextAttemptAt: Date;
	declare lastError: CreationOptional<string>;
	declare sentAt: CreationOptional<Date | null>;
	declare createdAt: CreationOptional<Date>;
}

export function initOutgoingMail(sequelize: Sequelize): void {
	OutgoingMail.init(
		{
			id: id,
			workshopId: reference,
			sheetId: optionalReference,
			messageId: text,
			recipient: text,
			subject: text,
			textBody: { type: DataTypes.TEXT, allowNull: false },
			htmlBody: { type: DataTypes.TEXT, allowNull: false },
			state: { ...text, defaultValue: 'waiting' },
			attempts: { ...whole, defaultValue: 0 },
			nextAttemptAt: moment,
			lastError: textOrEmpty,
			sentAt: optionalMoment,
			createdAt: moment
		},
		{ sequelize, tableName: 'outgoing_mails', ...writtenOnce, modelName: 'OutgoingMail' }
	);
}
