"""Farside: checks a plan for a light-cured filling before the light is used."""
