"""How a report looks: as text, JSON and CSV, as a drawing's figures, and rules and formats as pages."""
