import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { AskedThen, KeptAnswers } from '$lib/schemas/pre-drill';
import {
	edited,
	id,
	json,
	moment,
	optionalJson,
	optionalMoment,
	optionalText,
	reference,
	whole
} from './base';

/** What was asked before a hole was drilled, one a mount. */
export class PreDrillCheck extends Model<
	InferAttributes<PreDrillCheck>,
	InferCreationAttributes<PreDrillCheck>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare mountId: number;
	declare answers: KeptAnswers;
	/** Who put a name under the answers as they stand; a later change takes it off. */
	declare signedBy: CreationOptional<string | null>;
	declare signedAt: CreationOptional<Date | null>;
	/** What was asked then; null for those from before it was kept. */
	declare signedFor: CreationOptional<AskedThen[] | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initPreDrillCheck(sequelize: Sequelize): void {
	PreDrillCheck.init(
		{
			id: id,
			workshopId: reference,
			mountId: reference,
			answers: json,
			signedBy: optionalText,
			signedAt: optionalMoment,
			signedFor: optionalJson,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'pre_drill_checks', ...edited, modelName: 'PreDrillCheck' }
	);
}
