/** The migrated database that each test file's own is copied from. */
export const TEMPLATE = 'cagewright_template';
