// Loaded in front of a child's own program: when the process that started it is gone, however that ended, the child
// tidies up and goes too. The channel must not by itself keep the child alive.
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'));
process.channel?.unref();
