"""Offers side by side: page, workbook and JSON."""
