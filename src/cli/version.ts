import { version } from "../../package.json";

export const TOOL_VERSION = version;
