/** What a menu or a shortcut asks for and a page that may not be there yet carries out. */
class Requests {
  /** the command search of the desk, or the search of the Shelf */
  search = $state(false)
  newProject = $state(false)
  importFiles = $state(false)
}

export const requests = new Requests()
