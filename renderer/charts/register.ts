import { Chart, LineController, LineElement, LinearScale, LogarithmicScale, PointElement } from 'chart.js'
import annotation from 'chartjs-plugin-annotation'
import zoom from 'chartjs-plugin-zoom'

Chart.register(LineController, LineElement, LinearScale, LogarithmicScale, PointElement, annotation, zoom)

export { Chart }
