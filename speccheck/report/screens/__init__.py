"""Text for the screen."""
