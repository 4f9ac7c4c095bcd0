// Takes the mail that the application sends on this machine and keeps each message as a file. Nothing leaves here.
import { randomBytes } from 'node:crypto';
import { text } from 'node:stream/consumers';
import { join } from 'node:path';
import { SMTPServer } from 'smtp-server';
import { writeWhole } from './lib/files.mjs';

const [portWords, folder] = process.argv.slice(2);
const LARGEST_MESSAGE_BYTES = 10_000_000;

/** @param {Date} moment */
function messageFile(moment) {
	return `${moment.toISOString().replace(/[:.]/g, '-')}-${randomBytes(4).toString('hex')}.eml`;
}

/**
 * @param {import('smtp-server').SMTPServerDataStream} stream
 * @param {string} mailbox
 */
async function keep(stream, mailbox) {
	const message = await text(stream);
	if (stream.sizeExceeded) {
		throw Object.assign(new Error(`The message is over ${LARGEST_MESSAGE_BYTES} bytes`), {
			responseCode: 552
		});
	}
	await writeWhole(join(mailbox, messageFile(new Date())), message);
}

/**
 * Whoever wants to see what becomes of a letter whose answer is never heard writes to an address that begins so.
 * @param {import('smtp-server').SMTPServerSession} session
 */
const isToHangUpOn = ({ envelope }) =>
	envelope.rcptTo.some(({ address }) => address.startsWith('unanswered.'));

/** @param {import('smtp-server').SMTPServerSession} session */
function hangUp({ id }) {
	for (const each of server.connections) if (each.session.id === id) each._socket.destroy();
}

if (!portWords || !folder) {
	console.error('Usage: local-mail.mjs PORT FOLDER');
	process.exit(2);
}

const server = new SMTPServer({
	authOptional: true,
	disabledCommands: ['AUTH', 'STARTTLS'],
	disableReverseLookup: true,
	size: LARGEST_MESSAGE_BYTES,
	onData: (stream, session, done) => {
		keep(stream, folder).then(() => (isToHangUpOn(session) ? hangUp(session) : done()), done);
	}
});
server.on('error', (error) => {
	console.error(error.message);
	if (!server.server.listening) process.exit(1);
});
server.listen(Number(portWords), '127.0.0.1', () => process.send?.({ listening: true }));
for (const signal of /** @type {const} */ (['SIGTERM', 'SIGINT'])) {
	process.once(signal, () => server.close(() => process.exit(0)));
}
