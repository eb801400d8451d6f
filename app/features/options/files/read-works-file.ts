import { mutationOptions } from '@tanstack/react-query';
import { largestWorksFile, readWorks } from '#contract/option-files.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { formatBytes } from '#app/lib/formats.ts';

/** Has the server read a file with works. Nothing is saved. */
export const readWorksMutation = (siteId: string) =>
  mutationOptions({
    mutationFn: async (file: File) => {
      if (file.size > largestWorksFile)
        throw new Error(
          `${file.name} holds ${formatBytes(file.size)}; at most ${formatBytes(largestWorksFile)} can be read. Split it.`,
        );
      return callEndpoint(readWorks, {
        params: { siteId },
        body: { fileName: file.name.slice(-255), content: await file.text() },
      });
    },
  });
