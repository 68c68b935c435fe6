// Preloaded into a child: when its parent is gone without a word, it stops as if asked to.
import { isMainThread } from 'node:worker_threads';

const stop = () => process.kill(process.pid, 'SIGTERM');
// Worker threads are preloaded with it too; they have no parent of their own, and one would stop the whole program.
if (isMainThread) {
  if (process.connected) process.on('disconnect', stop);
  else stop();
}
