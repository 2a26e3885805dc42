"""Blue light reaching the eyes: weights, reflected radiance, seconds a day."""
