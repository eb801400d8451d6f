import { z } from 'zod';

// The page's security policy forbids code made from strings, which zod would otherwise try. Schemas look at this when
// they are made, so this module is imported before any other that makes one.
z.config({ jitless: true });
