"""The physics alone: plain functions on floats, no files, no clinic, nothing remembered."""
