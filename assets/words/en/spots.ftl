# The skyline from a spot, the spots side by side, where to stand.
