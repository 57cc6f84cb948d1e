import express from 'express'

/** The least a JSON service can do: parse the body and send it back. What the real one costs is measured against it. */
const app = express()
app.use(express.json())
app.post('/echo', (request, response) => {
  response.json(request.body)
})
app.get('/readyz', (_, response) => {
  response.json({ status: 'ready' })
})
app.listen(Number(process.env['PORT']), '127.0.0.1')
