import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { RemedyOffer } from '$lib/thermal/outlook';
import { edited, id, json, moment, number, reference, whole } from './base';

/** What a workshop asks for its remedies, one list each. */
export class RemedyList extends Model<InferAttributes<RemedyList>, InferCreationAttributes<RemedyList>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare moneyPerHour: number;
	declare offers: RemedyOffer[];
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initRemedyList(sequelize: Sequelize): void {
	RemedyList.init(
		{
			id: id,
			workshopId: reference,
			moneyPerHour: number,
			offers: json,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'remedy_lists', ...edited, modelName: 'RemedyList' }
	);
}
