"""What is wired around the coil: from the signal at the terminals to the drive of the movement."""
