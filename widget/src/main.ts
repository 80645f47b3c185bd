import { pageNonce } from './element/page-nonce';
import { registerForm } from './element/register';

void registerForm(pageNonce(document, import.meta.url));
