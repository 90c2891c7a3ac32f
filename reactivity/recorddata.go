package reactivity

import (
	"fmt"
	"strconv"
	"sync"

	"lobecast/frontier/terms"
)

// recordHeader names the columns of calibration/record.csv.
var recordHeader = []string{"event", "outcomes", "substrates", "top1", "top1_low", "top1_high", "top2", "log_loss",
	"calibration", "chance_level", "clear_share", "clear_right", "group_top1"}

// recordRows is the record of the fitted events, as the last refit wrote it.
var recordRows = sync.OnceValue(func() []RecordRow {
	var rows []RecordRow
	err := calibrationTable("record.csv", len(recordHeader), func(rec []string) error {
		var x [12]float64
		for k := range x {
			v, err := strconv.ParseFloat(rec[k+1], 64)
			if err != nil {
				return err
			}
			x[k] = v
		}
		rows = append(rows, RecordRow{
			Event: terms.Event(rec[0]), Outcomes: int(x[0]), Substrates: int(x[1]), Top1: x[2], Top1Limits: [2]float64{x[3], x[4]},
			Top2: x[5], LogLoss: x[6], Calibration: x[7], ChanceLevel: x[8], ClearShare: x[9], ClearRight: x[10], GroupTop1: x[11],
		})
		return nil
	})
	if err != nil {
		panic(fmt.Sprintf("reactivity: embedded record: %v", err))
	}
	return rows
})
