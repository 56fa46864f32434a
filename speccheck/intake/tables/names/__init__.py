"""What a panel is called: titles, sheet names, model cells, and what can never be a name."""
