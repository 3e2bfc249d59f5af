/** The migrated, seeded database that every test file's own is a clone of. */
export const TEMPLATE = 'holdfast_template';
