"""The buyer's workbook: requirements, settings, deviations, answers."""
