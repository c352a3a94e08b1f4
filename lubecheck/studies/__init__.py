"""Questions that run the model many times."""
