"""Innocent readings that would explain a misfit."""
