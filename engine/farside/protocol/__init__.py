"""Rules as data: read, judged on values, put into words, and summed up in a digest."""
