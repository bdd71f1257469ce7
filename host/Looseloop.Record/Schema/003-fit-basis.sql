-- What a reading's fit was made with beside its points and dark levels: the detector's law, clock, pull, plan. A tracked reading
-- has none, since it rests on the full reading before it; neither has a reading kept before this version. A refit has its own.
CREATE TABLE fit_basis (
    reading INTEGER PRIMARY KEY REFERENCES reading (number),
    json TEXT NOT NULL
) STRICT;

-- Raw points that checked a reading. sweep: 1 at another duty, 2 after a longer dwell. A refit has none of its own.
CREATE TABLE check_point (
    reading INTEGER NOT NULL REFERENCES reading (number),
    sweep INTEGER NOT NULL,
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
    PRIMARY KEY (reading, sweep, place)
) STRICT, WITHOUT ROWID;
