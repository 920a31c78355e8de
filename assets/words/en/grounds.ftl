# Where to stand: the standing map, a crowd's patch, the spots side by side.

minutes-long = { $count ->
    [none] less than a minute
    [one] 1 minute
   *[many] { $minutes } minutes
}
stand-gain = Stand { $metres } m to the { $direction } ({ $degrees }) and you gain { $minutes }.
stand-no-gain = Nowhere on these grounds gives { $minutes } more than here.
stand-cost = Standing here costs { $minutes } against the best place of the grounds.
stand-no-cost = No place of the grounds gives more than here.

# One window, and what ends it.
from-here = From here: { $start } to { $end }, { $minutes }{ $endCause ->
    [skyline] , then behind { $obstacle }.
    [horizon] , then it sets.
    [haze] , then it fades into the haze.
    [moonlight] , then the moonlight drowns it.
    [sunrise] , then the Sun rises.
    [optics] , then every instrument is capped.
    [half] , and on past the middle of the night.
    [noon] , and on until midday.
   *[twilight] , then the sky is too bright.
}
from-here-again = Again { $start } to { $end }, { $minutes }.
from-here-none = From here: not at all, { $why ->
    [faint] it is too faint for the unaided eye.
    [sun-up] the Sun does not set.
    [down] it is below the horizon.
    [up-with-sun] it is up only while the Sun is too.
    [blocked] it never comes out from behind what stands around.
   *[too-bright] the sky is too bright while it is in view.
}
here-is-kit = Here stands: { $kit }.

# A square of the standing map.
square-window = { $start } to { $end }, { $minutes }
square-nights = { $minutes } in all, at least { $least } each night
square-nothing = never in view from here
square-waiting = not worked out yet
square-outside = off the grounds: nobody is to stand here
square-excluded = { $label }: nobody is to stand here
square-in-obstacle = in { $obstacle }: nobody can stand here

# A crowd on a patch.
patch-worst = Worst off is { $who } { $place }: { $minutes }.
patch-median = In the middle of the ranking is { $who } { $place }: { $minutes }.
patch-nobody = Nobody can stand on this patch.
patch-place-middle = in the middle of the patch
patch-place = { $metres } m to the { $direction } ({ $degrees }) of the patch’s middle
patch-adult = an adult
patch-child = a child
patch-wheelchair = somebody in a wheelchair
