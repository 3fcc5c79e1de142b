import { benchDrag } from "./drag";
import { benchKernel } from "./kernel";
import { benchScreen } from "./screen";

/** Each bench answers with one line of JSON: cpuSeconds, sizes, and the rival's figure taken in the same run. */
const benches: Readonly<Record<string, () => Promise<object>>> = {
  kernel: benchKernel,
  screen: benchScreen,
  drag: benchDrag,
};

const name = process.argv[2] ?? "";
const bench = benches[name];
if (bench) {
  console.log(JSON.stringify(await bench()));
} else {
  const known = Object.keys(benches).join(", ");
  console.error(
    `There is no bench "${name}". Give one of: ${known}; for instance npm run --silent bench -- kernel`,
  );
  process.exitCode = 2;
}
