import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, reference, writtenOnce } from './base';

export class SignInStep extends Model<InferAttributes<SignInStep>, InferCreationAttributes<SignInStep>> {
	declare tokenHash: string;
	declare personId: number;
	declare expiresAt: Date;
	declare createdAt: CreationOptional<Date>;
}

export function initSignInStep(sequelize: Sequelize): void {
	SignInStep.init(
		{
			tokenHash: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: reference,
			expiresAt: moment,
			createdAt: moment
		},
		{ sequelize, tableName: 'sign_in_steps', ...writtenOnce, modelName: 'SignInStep' }
	);
}
