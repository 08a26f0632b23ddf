// Loaded into the server before its own code: when the launcher is gone, however it ended, the server ends as if told.
process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'));
// Waiting for that must not keep alive a server that has nothing left to do.
process.channel?.unref();
