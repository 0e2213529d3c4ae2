import { findDataFaults } from '@/lib/chemistry/data-check';
import { ALL_REACTIONS, ALL_SPECIES } from '@/lib/chemistry/species-catalogue';
import { ALL_SUBSTANCES } from '@/lib/chemistry/substances';

/** Prints what is wrong in the data files, and fails where anything is. */
const faults = findDataFaults();
console.log(
  `Checked ${ALL_SPECIES.length} species, ${ALL_REACTIONS.length} reactions, ${ALL_SUBSTANCES.length} substances: ${faults.length} faults.`,
);
for (const { where, what } of faults) console.log(`${where}: ${what}`);
process.exitCode = faults.length === 0 ? 0 : 1;
