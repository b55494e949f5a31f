namespace CircuitTransient.Studies.Draws;

public sealed partial class DrawWorkspace
{
    /// <summary>The end of a study whose file does not say: as the exact engine has it.</summary>
    private bool PutEnd()
    {
        if (kernel.Circuit.Original.Until is not null)
        {
            return true;
        }

        var form = forms[kernel.Plan.Intervals[^1].Form];
        var start = times.Starts[^2];
        foreach (var corner in kernel.Plan.Corners)
        {
            start = Math.Max(start, corner);
        }

        double longest = 0;
        for (var k = 0; k < form.Form.Order; k++)
        {
            var (re, im) = (form.PoleReal[k], Math.Abs(form.PoleImaginary[k]));
            var isNearAxis = Math.Abs(re) < 1e-11 * im || (im == 0 && re != 0 && -re < form.PoleErrors[k]);
            if (isNearAxis)
            {
                return false; // whether it decays at all is for the exact engine to say
            }

            longest = re < 0 ? Math.Max(longest, Math.Log(1000) / -re) : longest;
        }

        times.End(start + longest);
        return longest > 0;
    }

    private bool PutInitial()
    {
        kernel.Values.PutStored(parameters, stated);
        if (!kernel.Circuit.Original.StartsSettled)
        {
            for (var k = 0; k < stored.Length; k++)
            {
                stored[k] = double.IsNaN(stated[k]) ? 0 : stated[k];
            }

            return true;
        }

        kernel.Waves.Put(0, perpetual: true, factors, shifts, levels, slopes);
        return SettledValues.Put(forms[kernel.Plan.Initial], kernel.Waves, levels, stated, stored);
    }

    private void SetState(ClosedForm form)
    {
        var n = form.Form.Order;
        for (var i = 0; i < n; i++)
        {
            double sum = 0;
            for (var k = 0; k < stored.Length; k++)
            {
                sum += form.Stores[(i * stored.Length) + k] * stored[k];
            }

            modal[i] = sum;
        }
    }

    /// <summary>Holds every function's value and slope at an interval's start, made of its modes, against
    /// the same from the equations that were not taken apart.</summary>
    private void CheckStart(DrawSegment segment, ClosedForm form)
    {
        form.PutStart(stored, kernel.Waves, levels, slopes, atStart);
        for (var f = 0; f < served.Length; f++)
        {
            var function = kernel.Figures.Functions[f];
            if (!served[f] || function.Order > 0)
            {
                continue;
            }

            var start = form.RowAtStart(function.Row, kernel.Waves, levels, slopes, atStart);
            var modes = segment.AtStart(f);
            var (sizes, errors) = (startSizes[f], startErrors[f]);
            startSizes[f] = new StartOfRow(
                Math.Max(sizes.Value, modes.Size + start.Size),
                Math.Max(sizes.Slope, modes.Steepness + start.Steepness));
            startErrors[f] = new StartOfRow(
                Math.Max(errors.Value, Math.Abs(modes.Value - start.Value)),
                Math.Max(errors.Slope, Math.Abs(modes.Slope - start.Slope)));
        }
    }

    /// <summary>What the two differed by, of a function's size in the study, is an error that all
    /// inherits.</summary>
    private void InheritStarts()
    {
        const double rounding = 1e-14; // of sums of some dozen terms; less is in the bounds already
        double worst = 0;
        for (var f = 0; f < served.Length; f++)
        {
            worst = Math.Max(worst, Math.Max(
                Relative(startErrors[f].Value, startSizes[f].Value),
                Relative(startErrors[f].Slope, startSizes[f].Slope)));
        }

        inherited += worst > rounding ? worst : 0;

        static double Relative(double error, double size) => size > 0 ? error / size : 0;
    }
}
