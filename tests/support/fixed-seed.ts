import fc from 'fast-check';

/** The same cases on every run: a red build is a fault of the change under test. DRAINWRIGHT_SEED asks for other cases. */
fc.configureGlobal({ seed: Number(process.env.DRAINWRIGHT_SEED ?? 20_261) });
