"""Room light on an unset paste: the working window."""
