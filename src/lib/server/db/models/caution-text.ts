import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { RegionKey } from '$lib/format/caution-regions';
import { id, json, moment, reference, text, whole, writtenOnce } from './base';

/** What a workshop adds to the cautions; each change is a row of its own. */
export class CautionText extends Model<InferAttributes<CautionText>, InferCreationAttributes<CautionText>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	/** Counts up from 1 in each workshop. */
	declare number: number;
	declare region: RegionKey;
	declare sentences: string[];
	declare createdBy: number;
	declare createdAt: CreationOptional<Date>;
}

export function initCautionText(sequelize: Sequelize): void {
	CautionText.init(
		{
			id: id,
			workshopId: reference,
			number: whole,
			region: text,
			sentences: json,
			createdBy: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'caution_texts', ...writtenOnce, modelName: 'CautionText' }
	);
}
