# The skyline from a spot, the spots side by side, where to stand.

# Whose height; the height is the eye's over the ground.
stature-adult = adult { $height } m
stature-child = child { $height } m
stature-wheelchair = wheelchair { $height } m

# The strip
strip-title = Skyline from { $spot }
strip-name = Skyline from { $spot }, all round. Drag turns it, the wheel widens it; a measured point is dragged, added by a double click and deleted by its key.
strip-all-round = All round
strip-where-it-passes = Where { $body } passes
strip-clear = { $azimuth }, { $altitude } up: { $clearance } clear of { $obstacle }
strip-behind = { $azimuth }, { $altitude } up: behind { $obstacle }, { $clearance } from its edge
strip-body-clear = { $body } at { $azimuth }, { $altitude } up: { $clearance } clear of { $obstacle }
strip-body-behind = { $body } at { $azimuth }, { $altitude } up: behind { $obstacle }, { $clearance } from its edge
measured-here = The measured skyline is this spot’s own: drag its points, double-click for a new one.
measured-nothing = Nothing is measured from here yet: double-click in the drawing for a first point.
measured-nowhere = Nothing was measured from here: the skyline is that of the obstacles alone.
measured-elsewhere = The skyline measured from the mark does not hold here: none of it is marked as far.
measured-far-only = Measured from the mark: only the far parts of it hold here.
measured-point = Chosen point: { $azimuth }, { $altitude }. Ctrl and arrows move it by 0.1°, Delete takes it away.
