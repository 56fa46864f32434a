"""Claims read, and put together by panel."""
