"""The tender: requirements judged, the tender itself vetted, questions asked, answers taken in."""
