import fs from "node:fs";
import { syncBuiltinESMExports } from "node:module";

/*
 * Loaded ahead of a script with `node --import`: writing a file whose path ends with FULL_DISK_AT fails as it does
 * on a disk without space.
 */
const { writeFileSync } = fs;
fs.writeFileSync = (file, ...rest) => {
  if (new RegExp(process.env.FULL_DISK_AT).test(String(file)))
    throw Object.assign(new Error(`ENOSPC: no space left on device, write '${file}'`), {
      code: "ENOSPC",
      errno: -28,
      syscall: "write",
      path: file,
    });
  return writeFileSync(file, ...rest);
};
syncBuiltinESMExports();
