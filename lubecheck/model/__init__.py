"""From what the user said to the verdict: case, points, equilibrium, limits, plan, result."""
