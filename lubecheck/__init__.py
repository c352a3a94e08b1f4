"""Lubrication and thermal limits of rolling bearings."""

__version__ = "0.1.0"
