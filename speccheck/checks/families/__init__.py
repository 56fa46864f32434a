"""The checks themselves, a module a family."""
