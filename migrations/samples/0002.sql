-- Rows as the second schema has them: a code that was used, and one made at the server that was not.
INSERT INTO invitations_made (number, person, made_by, made, had_password, redeemed) VALUES
    (1, '00000000-0000-0000-0000-0000000000a1', '00000000-0000-0000-0000-0000000000a2', '2026-03-02T08:04:00.000Z', 0, '2026-03-02T08:05:00.000Z'),
    (2, '00000000-0000-0000-0000-0000000000a2', NULL, '2026-03-02T08:06:00.000Z', 1, NULL);
