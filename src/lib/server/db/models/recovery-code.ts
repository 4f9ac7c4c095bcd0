import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, reference, writtenOnce } from './base';

/** One way in for who has lost the telephone, kept as its hash; deleting is what uses it up. */
export class RecoveryCode extends Model<
	InferAttributes<RecoveryCode>,
	InferCreationAttributes<RecoveryCode>
> {
	declare codeHash: string;
	declare personId: number;
	declare createdAt: CreationOptional<Date>;
}

export function initRecoveryCode(sequelize: Sequelize): void {
	RecoveryCode.init(
		{
			codeHash: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: reference,
			createdAt: moment
		},
		{ sequelize, tableName: 'recovery_codes', ...writtenOnce, modelName: 'RecoveryCode' }
	);
}
