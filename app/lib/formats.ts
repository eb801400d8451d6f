/** The contract's way of writing numbers, under the name that pages know. */
export * from '#contract/formats.ts';
