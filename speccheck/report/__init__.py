"""Everything that is written; sees an Assessment only."""
