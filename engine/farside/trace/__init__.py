"""What the physics says happened: a plan walked through in the order of the chair."""
