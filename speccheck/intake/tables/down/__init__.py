"""Tables with parameters down the side: a column is a panel, a band or a statistic."""
