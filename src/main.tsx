import './index.css'
