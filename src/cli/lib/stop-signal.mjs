/**
 * Listens for Ctrl-C and its kin. While something is still being brought up, the programs at work are stopped, so that
 * the waiting for them ends; what is up is stopped in order by whoever waits for `received`.
 * @param {() => Promise<void>} stopWork
 */
export function onStopSignal(stopWork) {
	let happened = false;
	let waiting = false;
	/** @type {() => void} */
	let tell = () => undefined;
	/** @type {Promise<void>} */
	const promise = new Promise((resolve) => (tell = resolve));
	// Ctrl-C reaches us twice when npm passes it on as well: once is enough.
	const stop = () => {
		if (happened) return;
		happened = true;
		tell();
		if (!waiting) void stopWork();
	};
	for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(signal, stop);
	// A terminal that is gone takes no words, which is no reason to leave things running.
	process.stdout.on('error', () => undefined);
	process.stderr.on('error', () => undefined);
	return {
		happened: () => happened,
		get received() {
			waiting = true;
			return promise;
		}
	};
}
