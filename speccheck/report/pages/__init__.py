"""Pages to read and sign: HTML, PDF and their figures."""
