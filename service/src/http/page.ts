/** One page of a list. */
export interface Page {
  readonly limit: number;
  readonly offset: number;
}

/** The contract fills both in; its types do not know that. */
export const pageOf = (query: { readonly limit?: number; readonly offset?: number }): Page => ({
  limit: query.limit ?? 50,
  offset: query.offset ?? 0,
});
