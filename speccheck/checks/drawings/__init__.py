"""The numbers behind the figures."""
