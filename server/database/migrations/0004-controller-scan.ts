/** Milliseconds between two looks of a machine's controller at its drives; null: nobody has said. */
const controllerScan = `
ALTER TABLE machine ADD COLUMN controller_scan_ms REAL CHECK (controller_scan_ms > 0);`

export const controllerScanStep = { name: 'controller-scan', sql: controllerScan } as const
