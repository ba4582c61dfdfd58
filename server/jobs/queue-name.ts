/** The schema that pg-boss keeps its tables in. */
export const queueSchema = 'queue'
