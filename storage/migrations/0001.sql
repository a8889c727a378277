-- Version 1 of the register. The SQL is of the kind that SQLite and
-- PostgreSQL both take.

-- The assets as they are now.
CREATE TABLE asset (
    id      TEXT NOT NULL PRIMARY KEY,
    rev     BIGINT NOT NULL CHECK (rev > 0),
    name    TEXT NOT NULL,
    kind    TEXT NOT NULL,
    body    TEXT NOT NULL,   -- the asset file
    place   BIGINT NOT NULL, -- order in the fleet
    changed TEXT NOT NULL    -- RFC 3339, UTC
);

-- Every edit that ever was; rows are added, never changed. The body follows
-- from the one before it: its first keep_head and last keep_tail bytes, with
-- the row's own text between. A row that keeps nothing is whole.
CREATE TABLE history (
    asset_id  TEXT NOT NULL,
    rev       BIGINT NOT NULL CHECK (rev > 0),
    changed   TEXT NOT NULL,
    who       TEXT NOT NULL,
    deed      TEXT NOT NULL,
    what      TEXT NOT NULL,
    name      TEXT NOT NULL,
    kind      TEXT NOT NULL,
    keep_head BIGINT NOT NULL CHECK (keep_head >= 0),
    keep_tail BIGINT NOT NULL CHECK (keep_tail >= 0),
    body      TEXT NOT NULL,
    PRIMARY KEY (asset_id, rev)
);

-- What a person typed that has a fault: kept, but no part of the asset.
CREATE TABLE draft (
    asset_id TEXT NOT NULL REFERENCES asset (id) ON DELETE CASCADE,
    path     TEXT NOT NULL,
    entered  TEXT NOT NULL,
    PRIMARY KEY (asset_id, path)
);

-- Window size, last page and the like.
CREATE TABLE setting (
    name  TEXT NOT NULL PRIMARY KEY,
    value TEXT NOT NULL
);
