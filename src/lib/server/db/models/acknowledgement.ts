import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { id, moment, reference, text, writtenOnce } from './base';

export class Acknowledgement extends Model<
	InferAttributes<Acknowledgement>,
	InferCreationAttributes<Acknowledgement>
> {
	declare id: CreationOptional<number>;
	declare sheetId: number;
	declare name: string;
	declare textVersion: string;
	declare contentSha256: string;
	declare createdAt: CreationOptional<Date>;
}

export function initAcknowledgement(sequelize: Sequelize): void {
	Acknowledgement.init(
		{
			id: id,
			sheetId: reference,
			name: text,
			textVersion: text,
			contentSha256: { ...text, field: 'content_sha256' },
			createdAt: moment
		},
		{ sequelize, tableName: 'acknowledgements', ...writtenOnce, modelName: 'Acknowledgement' }
	);
}
