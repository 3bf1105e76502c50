"""Lewis count, delocalisation, electron domains, placement, repulsion."""
