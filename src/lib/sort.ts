/** Which column a list runs by, and which way. */
export type Sort = { column: string; direction: 'ascending' | 'descending' }
