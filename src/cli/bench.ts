import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { findMedian, formatTable } from './lib/bench-table';
import { CONTENDERS, DAYS, findTruth, type Contender } from './lib/bench-contenders';
import { readTraceFile, TRACE_ROWS, writeTraceFile, type TraceRead } from './lib/bench-trace';
import { LONG_RUNS, WORKLOADS } from './lib/bench-workloads';

const ROUNDS = 9;
const MEGABYTE = 1024 * 1024;
const SELF = fileURLToPath(import.meta.url);
/** Young memory so large that nothing is collected while a run is watched. */
const WATCHED = ['--expose-gc', '--max-semi-space-size=64'];

/** What a process of its own is asked for, and how it answers. */
type Request =
	{ warmUp: number } | { day: number } | { workload: number } | { hours: number } | { trace: string };

/** One contender in a process of its own, so that none runs on what another has done to the compiler. */
async function serve(name: string): Promise<void> {
	const contender = await CONTENDERS[name]?.();
	process.on('message', (request: Request) => {
		void answer(request, contender).then((told) => process.send?.(told));
	});
}

async function answer(request: Request, contender: Contender | undefined): Promise<unknown> {
	if ('warmUp' in request) return contender!.warmUp(request.warmUp) ?? null;
	if ('day' in request) return contender!.time(request.day);
	if ('workload' in request) return WORKLOADS[request.workload]!.time();
	if ('trace' in request) return readTraceFile(request.trace);
	return LONG_RUNS.watch(request.hours);
}

async function ask<T>(child: ChildProcess, request: Request): Promise<T> {
	child.send(request);
	return ((await once(child, 'message')) as [T])[0];
}

/** All contenders take turns in each round, so that whatever else the machine does falls on all of them. */
async function takeTurns(
	children: ReadonlyMap<string, ChildProcess>,
	day: number
): Promise<Map<string, number>> {
	const times = new Map([...children.keys()].map((name) => [name, [] as number[]]));
	for (const child of children.values()) await ask(child, { warmUp: day });
	for (let round = 0; round < ROUNDS; round++) {
		for (const [name, child] of children) times.get(name)!.push(await ask<number>(child, { day }));
	}
	return new Map([...times].map(([name, all]) => [name, findMedian(all)]));
}

async function compareDays(): Promise<void> {
	const children = new Map(Object.keys(CONTENDERS).map((name) => [name, fork(SELF, [name])]));
	for (const [day, { name }] of DAYS.entries()) {
		const truth = await findTruth(day);
		const times = await takeTurns(children, day);
		const engineMs = times.get('engine')!;
		const rows = [['', 'ms', 'times the engine', 'evaluations', 'largest K', 'largest event s']];
		for (const [each, load] of Object.entries(CONTENDERS)) {
			const { evaluations, largestK, largestEventS } = (await load()).compare(day, truth);
			const ms = times.get(each)!;
			rows.push([
				each,
				ms.toFixed(ms < 1 ? 3 : 1),
				(ms / engineMs).toFixed(each === 'engine' ? 0 : 1),
				String(evaluations),
				largestK.toFixed(4),
				largestEventS === null ? 'other events' : largestEventS.toFixed(2)
			]);
		}
		console.log(
			`\n${name}: ${truth.minutes.length - 1} min, ${truth.events.length} events, median of ${ROUNDS} rounds`
		);
		console.log(formatTable(rows));
	}
	for (const child of children.values()) child.disconnect();
}

async function timeWorkloads(): Promise<void> {
	const child = fork(SELF, ['workloads']);
	const rows = [['work', 'ms', 'days run', 'ms a day', 'times a sampled day']];
	let sampledMs: number | null = null;
	for (const [at, { name }] of WORKLOADS.entries()) {
		const { ms, days } = await ask<{ ms: number; days: number }>(child, { workload: at });
		sampledMs ??= ms / days;
		rows.push([
			name,
			ms.toFixed(1),
			String(days),
			(ms / days).toFixed(3),
			(ms / days / sampledMs).toFixed(2)
		]);
	}
	child.disconnect();
	console.log(`\n${formatTable(rows)}`);
}

async function watchLongRuns(): Promise<void> {
	const child = fork(SELF, ['long runs'], { execArgv: WATCHED });
	const rows = [['hours simulated', 'µs an hour', 'KiB allocated', 'bytes an hour']];
	for (const hours of LONG_RUNS.hours) {
		const { ms, bytes } = await ask<{ ms: number; bytes: number }>(child, { hours });
		rows.push([
			String(hours),
			((1000 * ms) / hours).toFixed(1),
			(bytes / 1024).toFixed(1),
			(bytes / hours).toFixed(0)
		]);
	}
	child.disconnect();
	console.log(`\nThe same day over and over, for its outcome alone:\n${formatTable(rows)}`);
}

/** Each file in a process of its own, whose peak of memory is then that file's. */
async function readTraces(): Promise<void> {
	const rows = [['rows of a trace', 'MB', 's', 'rows a second', 'peak memory MB']];
	const folder = await mkdtemp(join(tmpdir(), 'soakline-bench-'));
	try {
		for (const count of TRACE_ROWS) {
			const path = join(folder, `${count}.csv`);
			const bytes = await writeTraceFile(path, count);
			const child = fork(SELF, ['trace']);
			const { ms, kept, peakBytes } = await ask<TraceRead>(child, { trace: path });
			child.disconnect();
			if (kept !== count) throw new Error(`${kept} of ${count} rows were kept.`);
			rows.push([
				String(count),
				(bytes / MEGABYTE).toFixed(1),
				(ms / 1000).toFixed(2),
				String(Math.round(count / (ms / 1000))),
				(peakBytes / MEGABYTE).toFixed(0)
			]);
		}
	} finally {
		await rm(folder, { recursive: true });
	}
	console.log(`\nA logger's file, read as it comes from the disk:\n${formatTable(rows)}`);
}

const [role] = process.argv.slice(2);
if (role) await serve(role);
else {
	console.log(`${cpus()[0]?.model.trim()}, ${cpus().length} threads, Node ${process.versions.node}`);
	await compareDays();
	await timeWorkloads();
	await watchLongRuns();
	await readTraces();
}
