"""What known plots and simulated sites say about how often the key is right."""
