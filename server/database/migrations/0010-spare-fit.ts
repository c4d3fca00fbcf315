/*
 * Whether a kind of spare fits an axis, as it was last worked out, and by what: derived, and worked out again where the terms
 * are others by now. Kept, since a plant of 10,000 axes takes minutes to work out.
 */
const spareFit = `
CREATE TABLE spare_fit (
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  kind TEXT NOT NULL,
  terms TEXT NOT NULL,
  fits INTEGER NOT NULL CHECK (fits IN (0, 1)),
  PRIMARY KEY (axis_id, kind)
) STRICT, WITHOUT ROWID;`

export const spareFitStep = { name: 'spare-fit', sql: spareFit } as const
