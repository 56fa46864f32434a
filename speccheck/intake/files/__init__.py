"""Any file from outside to grids of cells."""
