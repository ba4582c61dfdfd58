const controller = new AbortController()

/** Aborted once, when the process has been asked to end: open streams close so that the server can. */
export const stopping = controller.signal

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => controller.abort())
