import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { id, moment, optionalReference, optionalText, reference, text, writtenOnce } from './base';

/** A question of a customer, or the shop's answer to one; kept as it was written. */
export class CustomerMessage extends Model<
	InferAttributes<CustomerMessage>,
	InferCreationAttributes<CustomerMessage>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	/** The page on which a question was asked. */
	declare sheetId: CreationOptional<number | null>;
	/** What is answered; null for a question. */
	declare questionId: CreationOptional<number | null>;
	/** Null for whoever held the link. */
	declare personId: CreationOptional<number | null>;
	declare authorName: string;
	declare body: string;
	/** Of the form that it was sent with: sent again, it is the same message. */
	declare onceKey: CreationOptional<string | null>;
	declare createdAt: CreationOptional<Date>;
}

export function initCustomerMessage(sequelize: Sequelize): void {
	CustomerMessage.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			sheetId: optionalReference,
			questionId: optionalReference,
			personId: optionalReference,
			authorName: text,
			body: text,
			onceKey: optionalText,
			createdAt: moment
		},
		{ sequelize, tableName: 'customer_messages', ...writtenOnce, modelName: 'CustomerMessage' }
	);
}
