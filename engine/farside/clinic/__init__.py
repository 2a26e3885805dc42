"""What a clinic writes down, as frozen records: plan, lamp, composite, adhesive, liner, usual values."""
