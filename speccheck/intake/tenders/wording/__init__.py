"""Words of tender clauses: cut into tokens, sorted into parts, settled into demands."""
