"""The published physics: pure functions on arrays, one subject a file, no files read, no state."""
