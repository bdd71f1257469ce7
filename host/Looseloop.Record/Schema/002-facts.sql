-- What is known of a box or a coil beside its readings, with the date it was found: the newest of a kind counts, older ones
-- stay. subject_kind: 0 box, 1 coil.

CREATE TABLE fact (
    number INTEGER PRIMARY KEY AUTOINCREMENT,
    id BLOB NOT NULL UNIQUE CHECK (length(id) = 16),
    subject_kind INTEGER NOT NULL,
    subject TEXT NOT NULL,
    kind TEXT NOT NULL,
    utc_us INTEGER NOT NULL,
    host_version TEXT NOT NULL,
    json TEXT NOT NULL
) STRICT;

CREATE INDEX fact_of_subject ON fact (subject_kind, subject, kind, utc_us);
