"""Light from the lamp to the far side of an increment: beam, bands, initiators, paste, transport, edge."""
