/** Saves one project as fast as it goes and tells each revision once it is stored, until it is killed. */
import { openLibrary } from '../../../electron/library/library.ts'
import { renamed, sampleProject } from '../projects.ts'

const library = openLibrary(process.argv[2] ?? '', 'loopback')
const { id } = library.projects.create(renamed(sampleProject(), 'at revision 1'))
process.stdout.write(`${id} 1\n`)
for (let revision = 1; ; revision += 1) {
  library.projects.save(id, revision, renamed(sampleProject(), `at revision ${revision + 1}`))
  process.stdout.write(`${id} ${revision + 1}\n`)
}
