"""What the tables hold: lubricants, bearings, cleanliness, air."""
