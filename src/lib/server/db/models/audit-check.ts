import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, optionalText, reference, text, whole } from './base';

/** When a workshop's audit trail was last looked through, and what was found. */
export class AuditCheck extends Model<InferAttributes<AuditCheck>, InferCreationAttributes<AuditCheck>> {
	declare workshopId: number;
	declare checkedAt: Date;
	/** How long it was when it was last found whole, and the hash of its last entry: nothing before may change since. */
	declare entries: number;
	declare headHash: string;
	/** Null when it was whole. */
	declare finding: CreationOptional<string | null>;
}

export function initAuditCheck(sequelize: Sequelize): void {
	AuditCheck.init(
		{
			workshopId: { ...reference, primaryKey: true },
			checkedAt: moment,
			entries: whole,
			headHash: text,
			finding: optionalText
		},
		{ sequelize, tableName: 'audit_checks', timestamps: false, modelName: 'AuditCheck' }
	);
}
