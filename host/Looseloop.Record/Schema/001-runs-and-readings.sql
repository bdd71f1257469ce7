-- Runs are start, then readings and events, then stop. Rows are added and never changed, save that a stop which was only
-- assumed gives way to the true one when that is imported. Numbers are local to a record; ids are unique everywhere (UUID
-- version 7, 16 bytes, big-endian). Times are microseconds since 1970-01-01 UTC. A figure that is not known is NULL.

CREATE TABLE box (
    number INTEGER PRIMARY KEY,
    port TEXT NOT NULL,
    board TEXT NOT NULL,
    firmware_version TEXT NOT NULL,
    protocol_version INTEGER NOT NULL,
    boot_id INTEGER NOT NULL,
    most_duty_bits INTEGER NOT NULL,
    lowest_hz INTEGER NOT NULL,
    highest_hz INTEGER NOT NULL,
    full_counts INTEGER NOT NULL,
    inputs INTEGER NOT NULL,
    UNIQUE (port, board, firmware_version, protocol_version, boot_id, most_duty_bits, lowest_hz, highest_hz, full_counts, inputs)
) STRICT;

CREATE TABLE set_up (
    number INTEGER PRIMARY KEY,
    json TEXT NOT NULL UNIQUE
) STRICT;

CREATE TABLE run (
    number INTEGER PRIMARY KEY AUTOINCREMENT,
    id BLOB NOT NULL UNIQUE CHECK (length(id) = 16),
    utc_us INTEGER NOT NULL,
    procedure TEXT NOT NULL,
    host_version TEXT NOT NULL,
    box INTEGER REFERENCES box (number),
    coil TEXT,
    note TEXT,
    options_json TEXT NOT NULL
) STRICT;

CREATE TABLE run_stop (
    run INTEGER PRIMARY KEY REFERENCES run (number),
    utc_us INTEGER NOT NULL,
    status INTEGER NOT NULL,
    reason TEXT NOT NULL,
    count INTEGER NOT NULL,
    assumed INTEGER NOT NULL DEFAULT 0
) STRICT;

CREATE TABLE event (
    number INTEGER PRIMARY KEY AUTOINCREMENT,
    id BLOB NOT NULL UNIQUE CHECK (length(id) = 16),
    run INTEGER NOT NULL REFERENCES run (number),
    utc_us INTEGER NOT NULL,
    monotonic_s REAL,
    kind INTEGER NOT NULL,
    from_us INTEGER,
    to_us INTEGER,
    detail TEXT NOT NULL
) STRICT;

CREATE INDEX event_of_run ON event (run);

CREATE TABLE reading (
    number INTEGER PRIMARY KEY AUTOINCREMENT,
    id BLOB NOT NULL UNIQUE CHECK (length(id) = 16),
    run INTEGER NOT NULL REFERENCES run (number),
    refit_of INTEGER REFERENCES reading (number),
    utc_us INTEGER NOT NULL,
    monotonic_s REAL,
    f0_hz REAL,
    f0_repeatability_hz REAL NOT NULL,
    f0_absolute_hz REAL NOT NULL,
    q REAL,
    q_repeatability REAL NOT NULL,
    q_absolute REAL NOT NULL,
    verdict INTEGER NOT NULL,
    temperature_c REAL,
    peak_counts REAL,
    feed_through REAL,
    ring_q REAL,
    ring_q_relative REAL,
    board_time_us INTEGER NOT NULL,
    board_s REAL,
    box INTEGER NOT NULL REFERENCES box (number),
    set_up INTEGER NOT NULL REFERENCES set_up (number),
    host_version TEXT NOT NULL,
    coil TEXT,
    note TEXT
) STRICT;

CREATE INDEX reading_of_run ON reading (run);
CREATE INDEX reading_of_coil ON reading (coil) WHERE coil IS NOT NULL;
CREATE INDEX reading_by_note ON reading (note) WHERE note IS NOT NULL;
CREATE INDEX refit_of_reading ON reading (refit_of) WHERE refit_of IS NOT NULL;

CREATE TABLE budget_line (
    reading INTEGER NOT NULL REFERENCES reading (number),
    place INTEGER NOT NULL,
    term TEXT NOT NULL,
    f0_hz REAL NOT NULL,
    q_relative REAL NOT NULL,
    repeatability INTEGER NOT NULL,
    degrees_of_freedom REAL, -- NULL: infinite
    origin TEXT NOT NULL,
    PRIMARY KEY (reading, place)
) STRICT, WITHOUT ROWID;

CREATE TABLE reason (
    reading INTEGER NOT NULL REFERENCES reading (number),
    place INTEGER NOT NULL,
    code TEXT NOT NULL,
    detail TEXT NOT NULL,
    PRIMARY KEY (reading, place)
) STRICT, WITHOUT ROWID;

-- Raw points and dark levels, in converter counts. A refit has none of its own: they are those of the reading it refits.
CREATE TABLE point (
    reading INTEGER NOT NULL REFERENCES reading (number),
    place INTEGER NOT NULL,
    duty_bits INTEGER NOT NULL,
    divider INTEGER NOT NULL,
    duty_count INTEGER NOT NULL,
    frequency_hz REAL NOT NULL,
    samples INTEGER NOT NULL,
    sum INTEGER NOT NULL,
    sum_squares INTEGER,
    min INTEGER NOT NULL,
    max INTEGER NOT NULL,
    board_time_us INTEGER NOT NULL,
    PRIMARY KEY (reading, place)
) STRICT, WITHOUT ROWID;

CREATE TABLE dark (
    reading INTEGER NOT NULL REFERENCES reading (number),
    place INTEGER NOT NULL,
    channel INTEGER NOT NULL,
    samples INTEGER NOT NULL,
    sum INTEGER NOT NULL,
    sum_squares INTEGER NOT NULL,
    min INTEGER NOT NULL,
    max INTEGER NOT NULL,
    from_us INTEGER NOT NULL,
    to_us INTEGER NOT NULL,
    PRIMARY KEY (reading, place)
) STRICT, WITHOUT ROWID;
