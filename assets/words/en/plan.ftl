# The plan of the site and the changes made on it.

grounds = Grounds
undo = Undo
undo-hint = Take the last change back
redo = Redo
redo-hint = Make the change again that was taken back
demo-site-copied = The changes to { $site } are kept in { $file }; the demo site itself stays as it was.
site-not-saved = The last change is not in the file yet: { $reason }
