import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { ZoneRule } from '$lib/schemas/own-zones';
import { edited, id, json, moment, optionalNumber, reference, text, whole } from './base';

/** A zone that a workshop defines for itself; of several that fit a place, the first in order has it. */
export class OwnZone extends Model<InferAttributes<OwnZone>, InferCreationAttributes<OwnZone>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare position: number;
	declare rule: ZoneRule;
	declare fromValue: number | null;
	declare toValue: number | null;
	declare placeIds: number[];
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initOwnZone(sequelize: Sequelize): void {
	OwnZone.init(
		{
			id: id,
			workshopId: reference,
			name: text,
			position: whole,
			rule: text,
			fromValue: optionalNumber,
			toValue: optionalNumber,
			placeIds: json,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'own_zones', ...edited, modelName: 'OwnZone' }
	);
}
