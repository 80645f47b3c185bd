import { pageNonce } from './element/page-nonce';
import { registerForm } from './element/register';

/** The file that partners load. It only has to be loaded: everything else is said with attributes. */
void registerForm(pageNonce(document, import.meta.url));
