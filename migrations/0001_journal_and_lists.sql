-- The journal, what is rebuilt from it for lists, and what never enters it (accounts, sessions, photos, openings).

-- What people sent, with what it came to: kept for ever, refused ones too.
CREATE TABLE acts (
    id TEXT NOT NULL PRIMARY KEY,
    content_hash TEXT NOT NULL CHECK (length(content_hash) = 64),
    outcome TEXT NOT NULL CHECK (json_valid(outcome)),
    received TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE TRIGGER acts_never_twice BEFORE INSERT ON acts
WHEN EXISTS (SELECT 1 FROM acts WHERE acts.id = NEW.id)
BEGIN SELECT RAISE(ABORT, 'an act is kept once'); END;
CREATE TRIGGER acts_never_changed BEFORE UPDATE ON acts
BEGIN SELECT RAISE(ABORT, 'acts are never changed'); END;
CREATE TRIGGER acts_never_removed BEFORE DELETE ON acts
BEGIN SELECT RAISE(ABORT, 'acts are never removed'); END;

-- Events, chain by chain; the hash covers the hash before, a line feed and the bytes.
CREATE TABLE events (
    chain TEXT NOT NULL CHECK (chain = 'installation' OR chain LIKE 'site:%' OR chain LIKE 'drive:%'),
    sequence INTEGER NOT NULL CHECK (sequence >= 1),
    previous TEXT NOT NULL,
    hash TEXT NOT NULL CHECK (length(hash) = 64),
    bytes TEXT NOT NULL CHECK (json_valid(bytes)),
    event TEXT NOT NULL UNIQUE,
    act TEXT NOT NULL REFERENCES acts (id),
    PRIMARY KEY (chain, sequence)
) STRICT, WITHOUT ROWID;

CREATE INDEX events_by_act ON events (act);

CREATE TRIGGER events_follow BEFORE INSERT ON events
WHEN NEW.sequence <> 1 + ifnull((SELECT max(sequence) FROM events WHERE chain = NEW.chain), 0)
    OR NEW.previous <> ifnull((SELECT hash FROM events WHERE chain = NEW.chain AND sequence = NEW.sequence - 1), '')
    OR EXISTS (SELECT 1 FROM events WHERE event = NEW.event)
BEGIN SELECT RAISE(ABORT, 'an event follows the last event of its chain, once'); END;
CREATE TRIGGER events_never_changed BEFORE UPDATE ON events
BEGIN SELECT RAISE(ABORT, 'events are never changed'); END;
CREATE TRIGGER events_never_removed BEFORE DELETE ON events
BEGIN SELECT RAISE(ABORT, 'events are never removed'); END;

-- The installation's stream: every event's hash in the order in which events came.
CREATE TABLE stream (
    sequence INTEGER NOT NULL PRIMARY KEY CHECK (sequence >= 1),
    chain TEXT NOT NULL,
    chain_sequence INTEGER NOT NULL,
    hash TEXT NOT NULL CHECK (length(hash) = 64),
    previous TEXT NOT NULL,
    stream_hash TEXT NOT NULL CHECK (length(stream_hash) = 64),
    UNIQUE (chain, chain_sequence),
    FOREIGN KEY (chain, chain_sequence) REFERENCES events (chain, sequence)
) STRICT;

CREATE TRIGGER stream_follows BEFORE INSERT ON stream
WHEN NEW.sequence <> 1 + ifnull((SELECT max(sequence) FROM stream), 0)
    OR NEW.previous <> ifnull((SELECT stream_hash FROM stream WHERE sequence = NEW.sequence - 1), '')
    OR EXISTS (SELECT 1 FROM stream WHERE chain = NEW.chain AND chain_sequence = NEW.chain_sequence)
BEGIN SELECT RAISE(ABORT, 'the stream runs on without a gap'); END;
CREATE TRIGGER stream_never_changed BEFORE UPDATE ON stream
BEGIN SELECT RAISE(ABORT, 'the stream is never changed'); END;
CREATE TRIGGER stream_never_removed BEFORE DELETE ON stream
BEGIN SELECT RAISE(ABORT, 'the stream is never shortened'); END;

-- From here to the next heading: rebuilt from the events at any time.
CREATE TABLE people (
    id TEXT NOT NULL PRIMARY KEY,
    login TEXT NOT NULL,
    active INTEGER NOT NULL CHECK (active IN (0, 1)),
    person TEXT NOT NULL CHECK (json_valid(person))
) STRICT, WITHOUT ROWID;

CREATE INDEX people_by_login ON people (login);

CREATE TABLE sites (
    id TEXT NOT NULL PRIMARY KEY,
    tag TEXT NOT NULL,
    name TEXT NOT NULL,
    last_change TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE INDEX sites_by_tag ON sites (tag);

CREATE TABLE drives (
    id TEXT NOT NULL PRIMARY KEY,
    site TEXT NOT NULL REFERENCES sites (id),
    tag TEXT NOT NULL,
    name TEXT NOT NULL,
    -- Lower case with the digits filled up, so that P-2 stands before P-10.
    tag_order TEXT NOT NULL,
    -- Lower case, what the search looks through.
    tag_search TEXT NOT NULL,
    name_search TEXT NOT NULL,
    status TEXT NOT NULL CHECK (status IN ('not-begun', 'in-progress', 'returned', 'signed', 'accepted')),
    revision INTEGER NOT NULL CHECK (revision >= 0),
    phases TEXT NOT NULL CHECK (json_valid(phases)),
    counts TEXT NOT NULL CHECK (json_valid(counts)),
    open_findings INTEGER NOT NULL CHECK (open_findings >= 0),
    last_change TEXT NOT NULL,
    signed_at TEXT,
    signed_by TEXT,
    CHECK ((status = 'signed') = (signed_at IS NOT NULL))
) STRICT, WITHOUT ROWID;

CREATE INDEX drives_board ON drives (site, tag_order, id);
CREATE INDEX drives_board_by_status ON drives (site, status, tag_order, id);
CREATE INDEX drives_by_tag ON drives (site, tag);
CREATE INDEX drives_queue ON drives (status, signed_at, id);
CREATE INDEX drives_search ON drives (tag_search, name_search, tag_order, id);

CREATE TABLE contributors (
    drive TEXT NOT NULL REFERENCES drives (id),
    person TEXT NOT NULL,
    PRIMARY KEY (drive, person)
) STRICT, WITHOUT ROWID;

CREATE INDEX contributors_by_person ON contributors (person, drive);

CREATE TABLE signatures (
    event TEXT NOT NULL PRIMARY KEY REFERENCES events (event),
    drive TEXT NOT NULL REFERENCES drives (id),
    revision INTEGER NOT NULL,
    meaning TEXT NOT NULL CHECK (meaning IN ('performed', 'accepted')),
    person TEXT NOT NULL,
    received TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE INDEX signatures_by_drive ON signatures (drive, revision);

-- Whoever recorded something in a record, or signed it, does not accept it: held here beside the rule in the program.
CREATE TRIGGER acceptance_by_another_event BEFORE INSERT ON events
WHEN json_extract(NEW.bytes, '$.fact.kind') = 'signed'
    AND json_extract(NEW.bytes, '$.fact.meaning') = 'accepted'
    AND EXISTS (
        SELECT 1 FROM contributors
        WHERE drive = substr(NEW.chain, 7) AND person = json_extract(NEW.bytes, '$.person')
    )
BEGIN SELECT RAISE(ABORT, 'who recorded or signed this record does not accept it'); END;
CREATE TRIGGER acceptance_by_another_signature BEFORE INSERT ON signatures
WHEN NEW.meaning = 'accepted'
    AND EXISTS (SELECT 1 FROM contributors WHERE drive = NEW.drive AND person = NEW.person)
BEGIN SELECT RAISE(ABORT, 'who recorded or signed this record does not accept it'); END;

-- From here on: outside the journal, and not rebuilt.
CREATE TABLE photos (
    hash TEXT NOT NULL PRIMARY KEY CHECK (length(hash) = 64),
    media TEXT NOT NULL CHECK (media IN ('image/jpeg', 'image/png', 'image/webp')),
    bytes INTEGER NOT NULL CHECK (bytes > 0),
    kept TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE TABLE passwords (
    person TEXT NOT NULL PRIMARY KEY,
    hash TEXT NOT NULL,
    since TEXT NOT NULL,
    last_sign_in TEXT
) STRICT, WITHOUT ROWID;

-- Failed attempts by what they were made on: a sign-in name, an address, a person signing, the set-up code.
CREATE TABLE attempts (
    subject TEXT NOT NULL PRIMARY KEY,
    failed INTEGER NOT NULL CHECK (failed >= 1),
    last TEXT NOT NULL,
    locked_until TEXT
) STRICT, WITHOUT ROWID;

CREATE INDEX attempts_by_last ON attempts (last);

CREATE TABLE sessions (
    token_hash TEXT NOT NULL PRIMARY KEY CHECK (length(token_hash) = 64),
    person TEXT NOT NULL,
    kind TEXT NOT NULL CHECK (kind IN ('strange', 'enrolled')),
    opened TEXT NOT NULL,
    last_used TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE INDEX sessions_by_person ON sessions (person);
CREATE INDEX sessions_by_last_used ON sessions (last_used);

CREATE TABLE invitations (
    person TEXT NOT NULL PRIMARY KEY,
    code_hash TEXT NOT NULL CHECK (length(code_hash) = 64),
    made TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE INDEX invitations_by_code ON invitations (code_hash);

-- At most one row: the hash of the code that the program printed for the first administrator.
CREATE TABLE set_up_code (
    one INTEGER NOT NULL PRIMARY KEY CHECK (one = 1),
    code_hash TEXT NOT NULL CHECK (length(code_hash) = 64)
) STRICT;

-- Heads of the stream that left the building: in packages, on tablets, in backup receipts.
CREATE TABLE witnessed (
    place TEXT NOT NULL,
    sequence INTEGER NOT NULL,
    hash TEXT NOT NULL,
    seen TEXT NOT NULL,
    PRIMARY KEY (place, sequence, hash)
) STRICT, WITHOUT ROWID;

-- When this store began, was brought to a newer shape, or came back from a backup.
CREATE TABLE openings (
    number INTEGER NOT NULL PRIMARY KEY,
    at TEXT NOT NULL,
    kind TEXT NOT NULL CHECK (kind IN ('created', 'migrated', 'restored', 'backup')),
    words TEXT NOT NULL
) STRICT;
