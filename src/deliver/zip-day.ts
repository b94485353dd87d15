/** Zip dates are local times: this one is the same in every zone. */
export const firstZipDay = '1980-01-01T00:00:00';
