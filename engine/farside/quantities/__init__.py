"""The quantities a rule can speak of: name, unit, meaning, reach, and how each is read from a trace."""
