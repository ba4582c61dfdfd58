import { isMainThread } from 'node:worker_threads'

// Loaded before a child's own code: when whoever started it is killed, the channel closes and the child stops itself.
if (isMainThread && process.channel) {
  process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'))
  // The open channel alone must not keep a child alive that has finished.
  process.channel.unref()
}
