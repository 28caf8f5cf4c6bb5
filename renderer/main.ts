import './compute/no-eval.ts'
import './theme/fonts.css'
import './theme/tokens.css'
import './theme/base.css'
import { mount } from 'svelte'
import App from './frame/App.svelte'
import { readToken } from './state/bridge-http.ts'
import { watchErrors } from './state/errors.ts'

readToken()
watchErrors()

const target = document.getElementById('app')
if (!target) throw new Error('index.html has no element #app')
mount(App, { target })
