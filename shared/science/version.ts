/** Bumped when any number the engine gives can change; stored with each fit. */
export const engine = { name: 'anionary', version: '1.0.1' } as const
