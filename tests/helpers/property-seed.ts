import fc from 'fast-check';

/**
 * The short run draws the same cases on every machine, so that what was green stays green; the long run draws new ones each
 * time and prints the seed of what it finds.
 */
if (!process.env['HOLDFAST_LONG']) fc.configureGlobal({ seed: 20_260 });
