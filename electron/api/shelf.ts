import { readProject, readProjectText } from '../../core/project/read.ts'
import type { AreaHandlers } from './context.ts'

export const shelfHandlers: AreaHandlers<'shelf'> = {
  'shelf:list': (filter, { library }) => library.projects.list(filter),
  'shelf:create': ({ project }, { library }) => library.projects.create(readProject(project)),
  'shelf:open': ({ id }, { library }) => library.projects.open(id),
  'shelf:save': ({ id, revision, project }, { library }) =>
    library.projects.save(id, revision, readProject(project)),
  'shelf:rename': ({ id, name }, { library }) => library.projects.rename(id, name),
  'shelf:duplicate': ({ id }, { library }) => library.projects.duplicate(id),
  'shelf:remove': ({ id }, { library }) => library.projects.remove(id),
  'shelf:restore': ({ id }, { library }) => library.projects.restore(id),
  'shelf:erase': ({ id }, { library }) => {
    library.projects.erase(id)
    return null
  },
  'shelf:import': ({ text }, { library }) => {
    const { id } = library.projects.create(readProjectText(text))
    return library.projects.row(id)
  },
}
