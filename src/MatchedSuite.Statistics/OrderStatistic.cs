namespace MatchedSuite.Statistics;

/// <summary>The value that stands at a place in ascending order, without sorting all.</summary>
/// <remarks>Source: Hoare (1961), Algorithm 65: Find, Communications of the ACM 4(7), 321-322; pivot: median of three.</remarks>
internal static class OrderStatistic
{
    /// <summary>The value at <paramref name="place"/>, counted from 0; reorders the values.</summary>
    public static double At(Span<double> values, int place)
    {
        int low = 0, high = values.Length - 1;
        while (low < high)
        {
            double pivot = MedianOfThree(values[low], values[low + ((high - low) / 2)], values[high]);
            int left = low, right = high;
            while (left <= right)
            {
                while (values[left] < pivot)
                    left++;
                while (values[right] > pivot)
                    right--;
                if (left > right)
                    break;
                (values[left], values[right]) = (values[right], values[left]);
                left++;
                right--;
            }

            if (place <= right)
                high = right;
            else if (place >= left)
                low = left;
            else
                break;
        }

        return values[place];
    }

    private static double MedianOfThree(double first, double second, double third) =>
        Math.Max(Math.Min(first, second), Math.Min(Math.Max(first, second), third));
}
