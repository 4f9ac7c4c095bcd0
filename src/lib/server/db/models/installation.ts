import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { AgreedItem, Difference } from '$lib/schemas/fitting';
import {
	day,
	edited,
	id,
	json,
	moment,
	optionalReference,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

/** A battery that was fitted, one a mount. */
export class Installation extends Model<
	InferAttributes<Installation>,
	InferCreationAttributes<Installation>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare mountId: number;
	/** What it was agreed on, and the recommendation that said so. */
	declare assessmentId: number;
	declare recommendationId: number | null;
	declare fittedOn: string;
	declare fittedBy: string;
	declare serialNumber: CreationOptional<string>;
	/** As it is agreed with that recommendation, and what was made otherwise. */
	declare agreed: AgreedItem[];
	declare differences: Difference[];
	declare note: CreationOptional<string>;
	declare createdBy: number;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initInstallation(sequelize: Sequelize): void {
	Installation.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			mountId: reference,
			assessmentId: reference,
			recommendationId: optionalReference,
			fittedOn: day,
			fittedBy: text,
			serialNumber: textOrEmpty,
			agreed: json,
			differences: json,
			note: textOrEmpty,
			createdBy: reference,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'installations', ...edited, modelName: 'Installation' }
	);
}
