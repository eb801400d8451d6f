import { describeFrontSpeeds } from '#sim-core/testing/front-speeds.ts';
import { describeGrazerProperties } from '#sim-core/testing/grazer-properties.ts';
import { describeKernelProperties } from '#sim-core/testing/kernel-properties.ts';
import { describeStepByHand } from '#sim-core/testing/step-by-hand.ts';
import { createReferenceKernel } from './reference-kernel.ts';

describeKernelProperties('the reference kernel', createReferenceKernel);
describeStepByHand('the reference kernel', createReferenceKernel);
describeGrazerProperties('the reference kernel', createReferenceKernel);
describeFrontSpeeds('the reference kernel', createReferenceKernel);
