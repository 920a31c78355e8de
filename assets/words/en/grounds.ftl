# Where to stand: the standing map and a crowd's patch.

minutes-long = { $count ->
    [none] less than a minute
    [one] 1 minute
   *[many] { $minutes } minutes
}

# A square of the standing map.
square-waiting = not worked out yet
square-outside = off the grounds: nobody is to stand here
square-excluded = { $label }: nobody is to stand here
square-in-obstacle = in the { $label }: nobody can stand here

# A crowd on a patch.
patch-worst = Worst off is { $who } { $place }: { $minutes }.
patch-median = In the middle of the ranking is { $who } { $place }: { $minutes }.
patch-nobody = Nobody can stand on this patch.
patch-place-middle = in the middle of the patch
patch-place = { $metres } m to the { $direction } ({ $degrees }) of the patch’s middle
patch-adult = an adult
patch-child = a child
patch-wheelchair = somebody in a wheelchair
