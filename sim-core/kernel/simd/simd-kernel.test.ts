import { describeFrontSpeeds } from '#sim-core/testing/front-speeds.ts';
import { describeKernelProperties } from '#sim-core/testing/kernel-properties.ts';
import { describeStepByHand } from '#sim-core/testing/step-by-hand.ts';
import { createSimdKernel } from './simd-kernel.ts';

describeKernelProperties('the shipping kernel', createSimdKernel);
describeStepByHand('the shipping kernel', createSimdKernel);
describeFrontSpeeds('the shipping kernel', createSimdKernel);
