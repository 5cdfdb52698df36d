/** Property tests draw the same cases every time, unless STOKESWELL_FUZZ asks for fresh ones. */
import fc from 'fast-check';

if (process.env.STOKESWELL_FUZZ === undefined) fc.configureGlobal({ seed: 20261201 });
