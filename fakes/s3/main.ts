import { listenOnLoopback, serveUntilStopped } from "../process/lifetime";
import { portOf, readOptions } from "../process/options";
import { ObjectStore } from "./object-store";
import { createS3Server } from "./server";

const options = readOptions(["port", "data", "bucket", "region"]);
const accessKeyId = process.env["S3_ACCESS_KEY_ID"];
const secretAccessKey = process.env["S3_SECRET_ACCESS_KEY"];
if (!accessKeyId || !secretAccessKey) {
  throw new Error("The S3 fake needs S3_ACCESS_KEY_ID and S3_SECRET_ACCESS_KEY in its environment.");
}

await new ObjectStore(options.data).createBucket(options.bucket);
const server = createS3Server({
  dataFolder: options.data,
  credentials: { accessKeyId, secretAccessKey, region: options.region },
});
await listenOnLoopback(server, portOf(options.port));
serveUntilStopped(async () => {
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
});
