// Preloaded into a child: when its parent is gone without a word, it stops as if asked to.
const stop = () => process.kill(process.pid, 'SIGTERM');
if (process.connected) process.on('disconnect', stop);
else stop();
