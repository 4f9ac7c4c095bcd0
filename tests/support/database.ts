/** Where the database of this test run is; `npm run services` starts one and says so in the environment. */
export function testDatabase() {
	const { DATABASE_HOST, DATABASE_PORT, DATABASE_NAME, DATABASE_USER, DATABASE_PASSWORD } = process.env;
	if (!DATABASE_HOST || !DATABASE_PORT || !DATABASE_NAME || !DATABASE_USER || !DATABASE_PASSWORD) {
		throw new Error('These tests need a database of their own: run them with `npm run services`.');
	}
	return {
		host: DATABASE_HOST,
		port: Number(DATABASE_PORT),
		database: DATABASE_NAME,
		user: DATABASE_USER,
		password: DATABASE_PASSWORD
	};
}
