"""Where the tables of a sheet lie, and what each value cell inherits from its headings."""
