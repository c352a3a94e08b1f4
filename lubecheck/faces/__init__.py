"""What a person or a program sees: commands, terminal, record."""
