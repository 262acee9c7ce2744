'use strict';

// Usage: node check-package.js PATH/datapackage.json
//
// Prints one line for each thing that is not as the Frictionless Data Package standard (version 1) asks for, or as the
// package itself says of its tables, then one line with the number of rows read. Exit 0: nothing found; 1: something
// found; 2: the check itself could not be done.

const { Package } = require('datapackage');

async function findings(path) {
  const found = [];
  const dataPackage = await Package.load(path, { strict: false });
  dataPackage.errors.forEach((error) => found.push(`package: ${error.message}`));
  let rows = 0;
  for (const resource of dataPackage.resources) {
    if (!resource.tabular || !resource.valid) {
      found.push(`${resource.name}: not a table as the standard describes it`);
      continue;
    }
    let read;
    try {
      // with forceCast a row with an error comes back as that error, so that all of them are seen
      read = await resource.read({ keyed: true, forceCast: true });
    } catch (error) {
      found.push(`${resource.name}: ${error.message}`);
      continue;
    }
    rows += read.length;
    for (const row of read) {
      if (row instanceof Error) {
        const causes = row.errors && row.errors.length > 0 ? row.errors : [row];
        causes.forEach((cause) => found.push(`${resource.name}, row ${row.rowNumber}: ${cause.message}`));
      }
    }
  }
  return { found, rows };
}

findings(process.argv[2])
  .then(({ found, rows }) => {
    found.forEach((line) => console.log(line));
    console.log(`rows read: ${rows}`);
    process.exitCode = found.length > 0 ? 1 : 0;
  })
  .catch((error) => {
    console.log(`cannot check: ${error.message}`);
    process.exitCode = 2;
  });
