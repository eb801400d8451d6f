// Before tests that are run without `npm test`: the kernel that they load must be of the present sources.
export { ensureKernel as setup } from './lib/shell.mjs';
