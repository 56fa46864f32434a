"""Tables with headings across the top: a row is a panel, or a panel and band."""
