import { Component } from '@angular/core';

@Component({ selector: 'tb-sign-in-page', template: '' })
export class SignInPage {}
