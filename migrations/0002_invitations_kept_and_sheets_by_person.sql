-- Every one-time code that was ever made, by whom, and when it was used: outside the journal, and not rebuilt.
-- Without a code's secret; the open invitation itself stays in `invitations`.
CREATE TABLE invitations_made (
    number INTEGER NOT NULL PRIMARY KEY,
    person TEXT NOT NULL,
    -- Whoever was signed in; empty when the program made it at the server itself.
    made_by TEXT,
    made TEXT NOT NULL,
    -- Whether the person had a password already, so that the code takes that one's place.
    had_password INTEGER NOT NULL CHECK (had_password IN (0, 1)),
    redeemed TEXT
) STRICT;

CREATE INDEX invitations_made_by_person ON invitations_made (person, number);

CREATE TRIGGER invitations_made_never_removed BEFORE DELETE ON invitations_made
BEGIN SELECT RAISE(ABORT, 'what codes were made is never removed'); END;

-- Who created a drive or filled in its sheets: the start page asks.
CREATE INDEX sheets_by_person ON events (json_extract(bytes, '$.person'), chain)
WHERE json_extract(bytes, '$.fact.kind') IN ('drive-created', 'field-set');
