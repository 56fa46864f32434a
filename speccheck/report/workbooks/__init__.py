"""Workbooks to work in: review, reading, form, and what they are made of."""
