"""The desk check of RF exposure."""
