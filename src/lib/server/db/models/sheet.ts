import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize
} from 'sequelize';
import type { SheetContent } from '$lib/schemas/sheets';
import type { Acknowledgement } from './acknowledgement';
import {
	id,
	json,
	moment,
	optionalMoment,
	optionalReference,
	reference,
	text,
	textOrEmpty,
	writtenOnce
} from './base';
import type { Job } from './job';
import type { Recommendation } from './recommendation';

export class Sheet extends Model<InferAttributes<Sheet>, InferCreationAttributes<Sheet>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare recommendationId: number;
	declare tokenHash: string;
	declare textVersion: string;
	declare content: SheetContent;
	declare contentSha256: string;
	declare sentTo: CreationOptional<string>;
	declare firstOpenedAt: CreationOptional<Date | null>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<number | null>;
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
	declare acknowledgement?: NonAttribute<Acknowledgement | null>;
	declare job?: NonAttribute<Job>;
	declare recommendation?: NonAttribute<Recommendation>;
}

export function initSheet(sequelize: Sequelize): void {
	Sheet.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			recommendationId: reference,
			tokenHash: text,
			textVersion: text,
			content: json,
			contentSha256: { ...text, field: 'content_sha256' },
			sentTo: textOrEmpty,
			firstOpenedAt: optionalMoment,
			withdrawnAt: optionalMoment,
			withdrawnBy: optionalReference,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'sheets', ...writtenOnce, modelName: 'Sheet' }
	);
}
